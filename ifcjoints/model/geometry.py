"""Solids bounded by planes, and plane frames: the geometry that everything is measured on.

All lengths are mm. A :class:`Solid` keeps its faces as flat arrays, so that cutting it with a plane or
piercing it with many lines is a handful of numpy calls whatever the number of faces.
"""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from functools import cached_property
from itertools import pairwise

import numpy as np
import numpy.typing as npt

from .units import Array, Mm

OPEN = 1e-5
"""A closed body's area vectors cancel to this share of its surface."""

Indices = npt.NDArray[np.int64]


def unit(vector: Array) -> Array:
    """Return the vector at length 1."""
    length: Array = vector / np.linalg.norm(vector)
    return length


def cross(first: Array, second: Array) -> Array:
    """Return the cross product of two vectors (far quicker than numpy's general one for three numbers)."""
    (a, b, c), (x, y, z) = first.tolist(), second.tolist()
    return np.array([b * z - c * y, c * x - a * z, a * y - b * x])


def signed_area(ring: Array) -> float:
    """Return a ring's (k, 2) area, positive if it turns left."""
    x, y = ring.T
    return 0.5 * float(x @ np.roll(y, -1) - y @ np.roll(x, -1))


def crosses(first: Array, second: Array) -> Array:
    """Return the cross products of the rows of two arrays (n, 3)."""
    (a, b, c), (x, y, z) = first.T, second.T
    return np.column_stack([b * z - c * y, c * x - a * z, a * y - b * x])


@dataclass(frozen=True, slots=True)
class Frame:
    """A right-handed frame. `axes` (3, 3) holds the unit x, y and z axes as rows."""

    origin: Array
    axes: Array

    @classmethod
    def from_z(cls, origin: Array, z: Array, x_hint: Array | None = None) -> Frame:
        """Build a frame on a normal; x is as near to `x_hint` as the normal allows."""
        z = unit(z)
        hint = x_hint if x_hint is not None else np.eye(3)[int(np.argmin(np.abs(z)))]
        x = unit(hint - (hint @ z) * z)
        return cls(origin, np.array([x, cross(z, x), z]))

    def to_local(self, points: Array) -> Array:
        """Return world points (…, 3) in this frame."""
        local: Array = (points - self.origin) @ self.axes.T
        return local

    def to_world(self, points: Array) -> Array:
        """Return points (…, 3) of this frame, or (…, 2) of its plane, in the world."""
        world: Array = points @ self.axes[: points.shape[-1]] + self.origin
        return world


class Solid:
    """A body bounded by plane faces.

    `vertices` (n, 3); `corners` the vertex numbers of all loops one after another; `loop_start` where
    each loop begins in it; `loop_face` the face each loop bounds. A face's first loop is its outside.
    """

    def __init__(self, vertices: Array, corners: Indices, loop_start: Indices, loop_face: Indices) -> None:
        self.vertices = vertices
        self.corners = corners
        self.loop_start = loop_start
        self.loop_face = loop_face

    @classmethod
    def from_faces(cls, vertices: Array, faces: Iterable[Sequence[Sequence[int]]]) -> Solid:
        """Build a solid from faces, each a sequence of loops of vertex numbers, the outside first."""
        corners: list[int] = []
        loop_start: list[int] = []
        loop_face: list[int] = []
        for number, face in enumerate(faces):
            for loop in face:
                loop_start.append(len(corners))
                loop_face.append(number)
                corners.extend(loop)
        return cls(vertices, np.array(corners, int), np.array(loop_start, int), np.array(loop_face, int))

    @classmethod
    def extruded(cls, rings: Sequence[Array], matrix: Array, along: Array) -> Solid:
        """Sweep rings (k, 2), the outside first, along a vector of the frame `matrix` (4, 4).

        Rings may turn either way: the outside is made to turn left, holes right, so that faces look outwards.
        """
        rings = [ring if (signed_area(ring) > 0) == (number == 0) else ring[::-1] for number, ring in enumerate(rings)]
        flat = np.vstack(rings)
        bottom = np.column_stack([flat, np.zeros(len(flat))])
        vertices = np.vstack([bottom, bottom + along]) @ matrix[:3, :3].T + matrix[:3, 3]
        starts = np.cumsum([0, *[len(ring) for ring in rings]])
        loops = [list(range(a, b)) for a, b in pairwise(starts.tolist())]
        top = len(flat)
        faces: list[list[list[int]]] = [
            [loop[::-1] for loop in loops],
            [[i + top for i in loop] for loop in loops],
        ]
        for loop in loops:
            following = [*loop[1:], loop[0]]
            faces += [[[a, b, b + top, a + top]] for a, b in zip(loop, following, strict=True)]
        return cls.from_faces(vertices, faces)

    def moved(self, matrix: Array) -> Solid:
        """Return the solid under a 4 × 4 transformation."""
        return Solid(self.vertices @ matrix[:3, :3].T + matrix[:3, 3], self.corners, self.loop_start, self.loop_face)

    @cached_property
    def next_corner(self) -> Indices:
        """For each corner the vertex that follows it in its loop."""
        following = np.roll(self.corners, -1)
        ends = np.append(self.loop_start[1:], len(self.corners)) - 1
        following[ends] = self.corners[self.loop_start]
        return following

    @cached_property
    def corner_loop(self) -> Indices:
        """For each corner its loop's number."""
        lengths = np.diff(np.append(self.loop_start, len(self.corners)))
        return np.repeat(np.arange(len(self.loop_start)), lengths)

    @cached_property
    def corner_face(self) -> Indices:
        """For each corner its face's number."""
        return self.loop_face[self.corner_loop]

    @cached_property
    def is_outer(self) -> npt.NDArray[np.bool_]:
        """For each loop whether it is its face's outside."""
        return np.concatenate([[True], self.loop_face[1:] != self.loop_face[:-1]])

    @cached_property
    def area_vectors(self) -> Array:
        """For each face its normal times its area (m, 3), holes taken off (Newell's method)."""
        base = self.vertices[self.corners[self.loop_start]][self.corner_loop]
        a, b = self.vertices[self.corners] - base, self.vertices[self.next_corner] - base
        loops = 0.5 * np.add.reduceat(crosses(a, b), self.loop_start, axis=0)
        outer = loops[self.is_outer]
        holes = np.where(self.is_outer, 0.0, np.linalg.norm(loops, axis=1))
        taken = np.bincount(self.loop_face, holes, minlength=len(outer))
        length = np.maximum(np.linalg.norm(outer, axis=1), 1e-12)
        scaled: Array = outer * (1 - taken / length)[:, None]
        return scaled

    @cached_property
    def areas(self) -> Array:
        """Area of each face (m,)."""
        areas: Array = np.linalg.norm(self.area_vectors, axis=1)
        return areas

    @cached_property
    def normals(self) -> Array:
        """Unit normal of each face (m, 3)."""
        normals: Array = self.area_vectors / np.maximum(self.areas, 1e-12)[:, None]
        return normals

    @cached_property
    def offsets(self) -> Array:
        """Distance of each face's plane from the origin along its normal (m,)."""
        first = self.vertices[self.corners[self.loop_start[self.is_outer]]]
        offsets: Array = np.einsum("ij,ij->i", self.normals, first)
        return offsets

    @cached_property
    def volume(self) -> float:
        """Volume of the body, by the divergence theorem; positive whichever way the faces turn."""
        centre = self.vertices.mean(axis=0)
        return abs(float(np.sum((self.offsets - self.normals @ centre) * self.areas))) / 3.0

    @cached_property
    def is_open(self) -> bool:
        """Whether the faces do not close, or do not all look outwards: their area vectors then do not cancel."""
        return float(np.linalg.norm(self.area_vectors.sum(axis=0))) > OPEN * float(self.areas.sum())

    @cached_property
    def open_edges(self) -> int:
        """How many edges bound one face only."""
        welded = np.unique(np.round(self.vertices, 3), axis=0, return_inverse=True)[1].reshape(-1)
        edges = np.sort(np.column_stack([welded[self.corners], welded[self.next_corner]]), axis=1)
        _, counts = np.unique(edges[edges[:, 0] != edges[:, 1]], axis=0, return_counts=True)
        return int((counts % 2).sum())

    @cached_property
    def bounds(self) -> tuple[Array, Array]:
        """The corners of the axis-parallel box around the solid."""
        return self.vertices.min(axis=0), self.vertices.max(axis=0)

    def bodies(self) -> list[Solid]:
        """Return the bodies that share no face and no vertex with one another, each as a solid."""
        label = np.arange(len(self.vertices))
        before = np.full_like(label, -1)
        face_start = self.loop_start[self.is_outer]
        while not np.array_equal(label, before):
            before = label.copy()
            lowest = np.minimum.reduceat(label[self.corners], face_start)
            np.minimum.at(label, self.corners, lowest[self.corner_face])
            label = label[label]
        of_face = label[self.corners[self.loop_start]]
        return [self] if np.ptp(of_face) == 0 else [self._part(of_face == name) for name in np.unique(of_face)]

    def _part(self, loops: npt.NDArray[np.bool_]) -> Solid:
        """Return the solid that some of the loops bound."""
        kept = loops[self.corner_loop]
        used, corners = np.unique(self.corners[kept], return_inverse=True)
        lengths = np.diff(np.append(self.loop_start, len(self.corners)))[loops]
        faces = np.unique(self.loop_face[loops], return_inverse=True)[1]
        return Solid(self.vertices[used], corners, np.cumsum(lengths) - lengths, faces)

    def extent(self, direction: Array) -> tuple[float, float]:
        """Return the least and greatest coordinate along a unit direction."""
        along = self.vertices @ direction
        return float(along.min()), float(along.max())

    def cut(self, frame: Frame) -> Array:
        """Cut the solid with the frame's plane; return the cut's segments (k, 2, 2) in the plane."""
        local = frame.to_local(self.vertices)
        height = local[:, 2]
        above = height > 0
        crossing = np.flatnonzero(above[self.corners] != above[self.next_corner])
        if not len(crossing):
            return np.empty((0, 2, 2))
        start, end = self.corners[crossing], self.next_corner[crossing]
        # Always from below to above, so that the two faces of an edge meet in the very same point.
        rising = above[end]
        a, b = local[np.where(rising, start, end)], local[np.where(rising, end, start)]
        share = a[:, 2] / (a[:, 2] - b[:, 2])
        points = a[:, :2] + share[:, None] * (b - a)[:, :2]
        face = self.corner_face[crossing]
        along = self.normals[face] @ frame.axes[:2].T
        order = np.lexsort((points[:, 0] * -along[:, 1] + points[:, 1] * along[:, 0], face))
        paired: Array = points[order].reshape(-1, 2, 2)
        return paired

    def pierced_at(self, points: Array, direction: Array) -> list[Array]:
        """Pierce the solid, its holes filled, with lines through `points` (k, 3) along a unit direction.

        Returns for each line the coordinates along it, from its point, where it passes through a face.
        """
        steepness = self.normals @ direction
        frame = Frame.from_z(np.zeros(3), direction)
        outer = self.is_outer[self.corner_loop] & (np.abs(steepness) > 0.05)[self.corner_face]
        if not outer.any():
            return [np.empty(0) for _ in points]
        flat = self.vertices @ frame.axes[:2].T
        a, b = flat[self.corners[outer]], flat[self.next_corner[outer]]
        face, count = self.corner_face[outer], len(steepness)
        places = points @ frame.axes[:2].T
        line, edge = np.nonzero((a[:, 1] > places[:, 1:]) != (b[:, 1] > places[:, 1:]))
        at, to = a[edge], b[edge]
        x, y = places[line].T
        right = at[:, 0] + (y - at[:, 1]) * (to - at)[:, 0] / (to - at)[:, 1] > x
        crossed = np.bincount(line[right] * count + face[edge[right]], minlength=len(points) * count)
        line, inside = np.nonzero(crossed.reshape(-1, count) % 2)
        along = (self.offsets[inside] - np.einsum("ij,ij->i", self.normals[inside], points[line])) / steepness[inside]
        return [np.sort(along[line == number]) for number in range(len(points))]


@dataclass(frozen=True, slots=True)
class Prism:
    """A plate: an outline (k, 2) with holes in the frame's plane z = 0, thick from there to `thickness`."""

    frame: Frame
    outline: Array
    holes: tuple[Array, ...]
    thickness: Mm

    def as_solid(self) -> Solid:
        """Return the plate's body."""
        matrix = np.eye(4)
        matrix[:3, :3], matrix[:3, 3] = self.frame.axes.T, self.frame.origin
        return Solid.extruded([self.outline, *self.holes], matrix, np.array([0.0, 0.0, self.thickness]))
