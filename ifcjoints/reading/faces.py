"""Plane faces that a model writes in pieces, joined: triangles, strips, and outlines with slits to their holes.

Whatever pierces or cuts a body fills its holes, which only works where a hole is an inner loop of a face.
"""

from __future__ import annotations

from collections.abc import Iterator

import numpy as np
import numpy.typing as npt
import shapely
from shapely.geometry.polygon import orient

from ..model.geometry import Frame, Indices, Solid
from ..model.units import Array

FLAT = 1e-5
"""Faces whose normals' product falls short of one by less than this lie in one plane."""

NO_AREA = 1e-6


def with_inner_loops(solid: Solid) -> Solid:
    """Return a solid in which every hole of a plane face is an inner loop, the same one if it is so already."""
    if not solid.is_outer.all():
        return solid
    label = _in_one_plane(solid)
    twice = np.zeros(len(label), bool)
    twice[solid.loop_face[_twice_through_a_corner(solid)]] = True
    pieces = (np.bincount(label, minlength=len(label))[label] > 1) | twice
    joined = [(label == name, *_joined(solid, label, name)) for name in np.unique(label[pieces & _real(solid)])]
    joined = [(faces, whole, frame) for faces, whole, frame in joined if _has_holes(whole)]
    if not joined:
        return solid
    kept = ~np.any([faces for faces, _, _ in joined], axis=0)
    return _with_faces(solid, kept, [(whole, frame) for _, whole, frame in joined])


def plane_areas(solid: Solid) -> Iterator[tuple[shapely.Geometry, Frame]]:
    """Yield each plane of a body's faces as one area, in its own frame."""
    label = _in_one_plane(solid)
    for name in np.unique(label[_real(solid)]):
        yield _joined(solid, label, name)


def face_rings(solid: Solid, flat: Array, face: int) -> list[Array]:
    """Return a face's rings (k, 2), the outside first, from its corners `flat` in its plane."""
    ends = np.append(solid.loop_start[1:], len(solid.corners))
    loops = np.flatnonzero(solid.loop_face == face)
    return [flat[solid.corners[solid.loop_start[loop] : ends[loop]]] for loop in loops]


def face_frame(solid: Solid, face: int) -> Frame:
    """Return a frame in a face's plane, z its normal."""
    corner = solid.corners[solid.loop_start[np.searchsorted(solid.loop_face, face)]]
    return Frame.from_z(solid.vertices[corner], solid.normals[face])


def _real(solid: Solid) -> npt.NDArray[np.bool_]:
    real: npt.NDArray[np.bool_] = solid.areas > NO_AREA
    return real


def _has_holes(area: shapely.Geometry) -> bool:
    return any(len(part.interiors) for part in shapely.get_parts(area) if isinstance(part, shapely.Polygon))


def _joined(solid: Solid, label: Indices, name: int) -> tuple[shapely.Geometry, Frame]:
    faces = np.flatnonzero((label == name) & _real(solid))
    frame = face_frame(solid, int(faces[0]))
    flat = frame.to_local(solid.vertices)[:, :2]
    rings = [face_rings(solid, flat, int(face)) for face in faces]
    return shapely.union_all([shapely.Polygon(each[0], each[1:]).buffer(0) for each in rings]), frame


def _with_faces(solid: Solid, kept: npt.NDArray[np.bool_], areas: list[tuple[shapely.Geometry, Frame]]) -> Solid:
    """Return a solid with some of its faces and with areas for the others."""
    vertices = [solid.vertices]
    ends = np.append(solid.loop_start[1:], len(solid.corners))
    faces = [[solid.corners[a:b].tolist()] for a, b in zip(solid.loop_start[kept], ends[kept], strict=True)]
    count = len(solid.vertices)
    for area, frame in areas:
        for polygon in shapely.get_parts(area):
            loops = []
            for ring in (orient(polygon).exterior, *orient(polygon).interiors):
                points = np.array(ring.coords)[:-1]
                vertices.append(frame.to_world(points))
                loops.append(list(range(count, count + len(points))))
                count += len(points)
            faces.append(loops)
    return Solid.from_faces(np.vstack(vertices), faces)


def _welded(solid: Solid) -> Indices:
    """Number the corners so that those in one place have one number."""
    return np.unique(np.round(solid.vertices, 3), axis=0, return_inverse=True)[1].reshape(-1)


def _twice_through_a_corner(solid: Solid) -> npt.NDArray[np.bool_]:
    """Return which loops pass a corner twice, as those do that reach their holes through a slit."""
    count = len(solid.loop_start)
    passed = np.unique(np.column_stack([solid.corner_loop, _welded(solid)[solid.corners]]), axis=0)[:, 0]
    every = np.bincount(solid.corner_loop, minlength=count)
    twice: npt.NDArray[np.bool_] = every > np.bincount(passed, minlength=count)
    return twice


def _in_one_plane(solid: Solid) -> Indices:
    """Label faces, so that those joined by an edge within one plane have one label."""
    welded = _welded(solid)
    edges = np.sort(np.column_stack([welded[solid.corners], welded[solid.next_corner]]), axis=1)
    order = np.lexsort(edges.T)
    same = (np.diff(edges[order], axis=0) == 0).all(axis=1)
    a, b = solid.corner_face[order[:-1][same]], solid.corner_face[order[1:][same]]
    flat = np.abs(np.einsum("ij,ij->i", solid.normals[a], solid.normals[b])) > 1 - FLAT
    a, b = a[flat], b[flat]
    label = np.arange(len(solid.areas))
    before = np.full_like(label, -1)
    while not np.array_equal(label, before):
        before = label.copy()
        lowest = np.minimum(label[a], label[b])
        np.minimum.at(label, a, lowest)
        np.minimum.at(label, b, lowest)
        label = label[label]
    return label
