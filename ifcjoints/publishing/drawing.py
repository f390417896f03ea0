"""A joint's bolt rows drawn to scale in the interface plane, as SVG.

The plane is seen from the supported member: x to the right, y up. Heights are running dimensions from the
bottom flange's centre line, which is where the lever arms are measured from.
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from xml.etree.ElementTree import Element, SubElement, tostring

from ..model.joints import Interface, Joint, Row, Shape
from ..model.units import Mm
from . import figures

WIDEST, HIGHEST = 300.0, 430.0
"""The largest picture of the joint itself, in pixels."""
LINE = 15.0
"""Height of a line of text, and so the least distance of two labels."""
LEFT, RIGHT, EDGE = 64.0, 120.0, 18.0

Points = Sequence[tuple[Mm, Mm]]


def draw(joint: Joint) -> str:
    """Return the drawing as one SVG element, empty for a joint without an interface or rows."""
    if joint.interface is None or not joint.rows:
        return ""
    plan = _Plan.of(joint, joint.interface)
    svg = Element("svg", {"class": "joint", "role": "img", "xmlns": "http://www.w3.org/2000/svg"})
    svg.set("viewBox", f"0 0 {plan.width:.1f} {plan.height:.1f}")
    svg.set("width", f"{plan.width:.0f}")
    SubElement(svg, "title").text = f"{len(joint.rows)} bolt rows in the interface plane"
    for shape in sorted(joint.front, key=_depth):
        _add(svg, "path", _css(shape), d=plan.path(shape), fill_rule="evenodd")
    _centre_lines(svg, plan, joint.interface)
    for row in joint.rows:
        _bolts(svg, plan, row, joint.bolts.diameter_mm)
    _row_numbers(svg, plan, joint.rows)
    _heights(svg, plan, joint.rows, joint.interface)
    return tostring(svg, encoding="unicode")


@dataclass(frozen=True, slots=True)
class _Plan:
    """Where a point of the interface plane stands in the picture; `scale` is pixels a mm."""

    left: Mm
    right: Mm
    top: Mm
    scale: float
    margin: float
    height: float

    @classmethod
    def of(cls, joint: Joint, interface: Interface) -> _Plan:
        xs, ys = zip(*_extent(joint, interface), strict=True)
        wide, high = max(max(xs) - min(xs), 1.0), max(max(ys) - min(ys), 1.0)
        scale = min(WIDEST / wide, HIGHEST / high)
        # Rows closer than a line of text need a column of labels higher than the picture.
        room = LINE * (len(joint.rows) + 3)
        margin = EDGE + max(0.0, room - high * scale) / 2
        return cls(min(xs), max(xs), max(ys), scale, margin, high * scale + 2 * margin)

    @property
    def width(self) -> float:
        return LEFT + (self.right - self.left) * self.scale + RIGHT

    def x(self, x: Mm) -> float:
        return LEFT + (x - self.left) * self.scale

    def y(self, y: Mm) -> float:
        return self.margin + (self.top - y) * self.scale

    def path(self, shape: Shape) -> str:
        return " ".join(
            "M" + " L".join(f"{self.x(x):.2f},{self.y(y):.2f}" for x, y in ring) + " Z" for ring in shape.rings
        )


def _extent(joint: Joint, interface: Interface) -> Iterator[tuple[Mm, Mm]]:
    """Yield the points that the picture must hold: outlines, bolts and flanges."""
    for shape in joint.front:
        for ring in shape.rings:
            yield from ring
    for row in joint.rows:
        yield from ((x, row.y_bottom_mm) for x in (*row.x_mm, 0.0))
    for flange, y in ((interface.bottom, 0.0), (interface.top, interface.flange_distance_mm)):
        yield from ((side * flange.width_mm / 2, y) for side in (-1, 1))


_BEHIND = ("carrier", "pack", "backing_plate", "end_plate")


def _depth(shape: Shape) -> int:
    """Order from the back to the front: the carrier, the end plate, then what stands on it."""
    return _BEHIND.index(shape.role) if shape.role in _BEHIND else len(_BEHIND)


def _css(shape: Shape) -> str:
    return "shape back" if shape.role in _BEHIND[:3] else "shape plate" if shape.role == "end_plate" else "shape front"


def _add(parent: Element, tag: str, css: str, **attributes: str | float) -> Element:
    values = {
        name.replace("_", "-"): value if isinstance(value, str) else f"{value:.2f}"
        for name, value in attributes.items()
    }
    return SubElement(parent, tag, {"class": css, **values})


def _text(parent: Element, css: str, x: float, y: float, text: str) -> None:
    # A third of the letters' height below the line that the label belongs to.
    _add(parent, "text", css, x=x, y=y + 4.0).text = text


def _centre_lines(svg: Element, plan: _Plan, interface: Interface) -> None:
    for y in (0.0, interface.flange_distance_mm):
        ends = plan.x(plan.left) - 8, plan.x(plan.right) + 8
        _add(svg, "line", "centre", x1=ends[0], x2=ends[1], y1=plan.y(y), y2=plan.y(y))


def _bolts(svg: Element, plan: _Plan, row: Row, diameter: Mm | None) -> None:
    """Draw each bolt as its shank and a cross; one of unknown diameter as the cross alone."""
    y, arm = plan.y(row.y_bottom_mm), max(3.0, (diameter or 0.0) * plan.scale * 0.75)
    for x in map(plan.x, row.x_mm):
        if diameter is not None:
            _add(svg, "circle", "bolt", cx=x, cy=y, r=diameter * plan.scale / 2)
        _add(svg, "path", "axis", d=f"M{x - arm:.2f},{y:.2f} H{x + arm:.2f} M{x:.2f},{y - arm:.2f} V{y + arm:.2f}")


def _row_numbers(svg: Element, plan: _Plan, rows: Sequence[Row]) -> None:
    wanted = [plan.y(row.y_bottom_mm) for row in rows]
    for number, (row, y) in enumerate(zip(rows, spread(wanted, LINE), strict=True), 1):
        _text(svg, "label end", LEFT - 22, y, f"row {number}")
        end, at = plan.x(min(row.x_mm, default=0.0)), plan.y(row.y_bottom_mm)
        _add(svg, "path", "leader", d=f"M{LEFT - 19:.2f},{y:.2f} L{LEFT - 8:.2f},{at:.2f} H{end:.2f}")


def _heights(svg: Element, plan: _Plan, rows: Sequence[Row], interface: Interface) -> None:
    """Dimension every row and the flanges' centre lines from the bottom flange, in one running chain."""
    levels = [(row.y_bottom_mm, figures.tenths(row.y_bottom_mm)) for row in rows]
    levels += [
        (interface.flange_distance_mm, f"{figures.tenths(interface.flange_distance_mm)} top flange"),
        (0.0, "0 bottom flange"),
    ]
    levels.sort(key=lambda level: -level[0])
    chain = plan.x(plan.right) + 16
    ends = plan.y(levels[0][0]), plan.y(levels[-1][0])
    _add(svg, "line", "dimension", x1=chain, x2=chain, y1=ends[0], y2=ends[1])
    placed = spread([plan.y(y) for y, _ in levels], LINE)
    for (y, text), at in zip(levels, placed, strict=True):
        _add(svg, "path", "dimension", d=f"M{chain - 4:.2f},{plan.y(y):.2f} h8 L{chain + 14:.2f},{at:.2f}")
        _text(svg, "label", chain + 17, at, text)


def spread(wanted: Sequence[float], least: float) -> list[float]:
    """Move labels, given from the top down, as little as keeps them `least` apart.

    Labels that would overlap become one block around the mean of their places; blocks that then meet
    are joined (the pool-adjacent-violators method of isotonic regression, on positions less their offsets).
    """
    blocks: list[tuple[float, int]] = []
    for number, place in enumerate(wanted):
        mean, size = place - number * least, 1
        while blocks and blocks[-1][0] > mean:
            before, more = blocks.pop()
            mean, size = (before * more + mean * size) / (more + size), more + size
        blocks.append((mean, size))
    means = [mean for mean, size in blocks for _ in range(size)]
    return [mean + number * least for number, mean in enumerate(means)]
