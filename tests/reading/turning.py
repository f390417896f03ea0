"""Makes turned bodies for tests, as a lathe and a mill would, anywhere in the world."""

from __future__ import annotations

import math
from itertools import pairwise

import numpy as np

from ifcjoints.model.geometry import Solid
from ifcjoints.reading.bodies import Piece, PlacedPiece


def anywhere(seed: int, reach: float = 5e4) -> np.ndarray:
    """Return a rigid transformation drawn at random."""
    random = np.random.default_rng(seed)
    turn, _ = np.linalg.qr(random.normal(size=(3, 3)))
    matrix = np.eye(4)
    matrix[:3, :3] = turn * np.linalg.det(turn)
    matrix[:3, 3] = random.uniform(-reach, reach, 3)
    return matrix


def lathed(profile, corners, start=0.0, bore=None, triangles=False):
    """Turn (radius, height) pairs about z in so many facets, corners at the radius; `bore` is a radius to drill.

    `triangles` writes each face as a fan from its first corner, so that corners and edges lie unevenly.
    """
    angles = start + 2 * math.pi * np.arange(corners) / corners
    ways = [profile] if bore is None else [profile, [(bore, profile[0][1]), (bore, profile[-1][1])]]
    vertices, faces, ends = [], [], ([], [])
    for number, way in enumerate(ways):
        rings = []
        for radius, height in way:
            rings.append(np.arange(corners) + len(vertices))
            vertices += [(radius * math.cos(a), radius * math.sin(a), height) for a in angles]
        for low, high in pairwise(rings):
            around = zip(low, np.roll(low, -1), np.roll(high, -1), high, strict=True)
            faces += [[list(face) if number == 0 else list(face)[::-1]] for face in around]
        ends[0].append(list(rings[0])[::-1] if number == 0 else list(rings[0]))
        ends[1].append(list(rings[-1]) if number == 0 else list(rings[-1])[::-1])
    if bore is None:
        faces += [list(end) for end in ends]
    else:
        faces += [_annulus(*end) for end in ends]
        faces = [face for group in faces for face in (group if isinstance(group[0][0], list) else [group])]
    if triangles:
        faces = [[[loop[0], a, b]] for face in faces for loop in face for a, b in pairwise(loop[1:])]
    return Solid.from_faces(np.array(vertices, float), faces)


def _annulus(outside, inside):
    """Return the faces between two rings, as quadrilaterals."""
    inside = inside[::-1]
    around = zip(outside, np.roll(outside, -1), np.roll(inside, -1), inside, strict=True)
    return [[[int(k) for k in face]] for face in around]


def placed(solid, matrix=None):
    """Return a solid as a piece at a place."""
    return PlacedPiece(Piece(solid), np.eye(4) if matrix is None else matrix)


def along(height):
    """Return a shift along z."""
    matrix = np.eye(4)
    matrix[2, 3] = height
    return matrix
