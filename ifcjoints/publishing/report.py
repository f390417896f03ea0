"""report.html: the whole audit as one quiet sheet, without network, scripts or loss.

The words stand in the template and in :mod:`.words`, the rounding in :mod:`.figures`; nothing is worked
out here that the audit does not hold.
"""

from __future__ import annotations

import re
from collections.abc import Iterator, Mapping
from pathlib import Path, PurePath
from typing import Any

from jinja2 import Environment, PackageLoader, StrictUndefined
from markupsafe import Markup, escape

from ..model.audit import Audit
from ..model.findings import Finding
from . import figures, words
from .drawing import draw
from .verdict import count, decisive, governing_result, in_short, joint_status

_SUBSCRIPT = re.compile(r"(?<![A-Za-z0-9_])([A-Za-zΑ-ω]+)_([A-Za-z0-9]+(?:,[A-Za-z0-9]+)*)")


def write_report(audit: Audit, path: Path) -> None:
    """Write report.html."""
    path.write_text(render_report(audit), encoding="utf-8", errors="replace", newline="\n")


def render_report(audit: Audit) -> str:
    """Return the report as the text of one HTML file."""
    template = _environment().get_template("report.html.j2")
    return template.render(
        audit=audit,
        name=PurePath(audit.model.path).name if audit.model.path else "an open model",
        counts=count(audit),
        in_short=in_short(audit),
        anchor={joint.id: f"joint-{number}" for number, joint in enumerate(audit.joints, 1)},
        settings=list(flattened(audit.settings)),
        words=words,
    )


def _environment() -> Environment:
    environment = Environment(
        loader=PackageLoader("ifcjoints.publishing"),
        autoescape=True,
        undefined=StrictUndefined,
        trim_blocks=True,
        lstrip_blocks=True,
    )
    environment.filters.update(
        tenths=figures.tenths,
        ratio=figures.ratio,
        percent=figures.percent,
        plain=figures.plain,
        symbols=symbols,
        resistances=resistances,
        against_limit=against_limit,
        governing=governing_result,
        decisive=decisive,
        status=joint_status,
        drawing=lambda joint: Markup(draw(joint)),
    )
    return environment


def symbols(text: str) -> Markup:
    """Set what follows an underscore in a symbol as its subscript: F_t,Rd."""
    return Markup(_SUBSCRIPT.sub(r"\1<sub>\2</sub>", str(escape(text))))


def resistances(resistance: Mapping[str, float]) -> Iterator[tuple[str, str, str]]:
    """Yield each resistance as symbol, figure and unit; the unit is what its name ends with."""
    for name, value in resistance.items():
        symbol, _, unit = name.rpartition("_")
        yield symbol, figures.tenths(value) if unit in ("kN", "kNm") else figures.plain(value), unit


def against_limit(finding: Finding) -> str:
    """Write a finding's figure and its limit so that they can be told apart."""
    if finding.value is not None and finding.limit is not None:
        value, limit = figures.apart(finding.value, finding.limit)
        return f"{value}, limit {limit}"
    return "" if finding.value is None else figures.plain(finding.value)


def flattened(settings: Mapping[str, Any], within: str = "") -> Iterator[tuple[str, str]]:
    """Yield every setting by its full name; of a table among the settings, each row by its number."""
    for name, value in settings.items():
        if isinstance(value, Mapping) and value:
            yield from flattened(value, f"{within}{name}.")
        elif isinstance(value, list | tuple) and any(isinstance(each, Mapping) for each in value):
            for number, row in enumerate(value, 1):
                yield f"{within}{name}, row {number}", "; ".join(f"{key} {each}" for key, each in row.items())
        else:
            yield f"{within}{name}", "not set" if value is None else str(value)
