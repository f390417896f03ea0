"""The commands. Exit status: 0 nothing failed, 1 a joint fails, 2 the input cannot be used, 130 interrupted."""

from __future__ import annotations

import os
import sys
from collections.abc import Callable, Iterator
from contextlib import contextmanager
from pathlib import Path
from typing import Annotated

import typer
from rich.console import Console
from rich.progress import BarColumn, Progress, TextColumn
from rich.table import Table
from rich.text import Text

from .audit import audit as run_audit
from .checking.contract import HEADINGS
from .checking.registry import InstalledCheck, installed_checks
from .errors import IfcJointsError, InputError
from .model.audit import Audit
from .model.joints import Joint
from .publishing import figures, words
from .publishing.audit_json import write_audit
from .publishing.files import write_files
from .publishing.property_sets import write_model
from .publishing.report import write_report
from .publishing.verdict import count, decisive, governing_result, in_short, joint_status
from .settings import read_settings

LONGEST_SUMMARY = 25
WIDTH_OF_PIPES = 140

app = typer.Typer(
    help="Audit the bolted moment joints of a steel building model in IFC.",
    add_completion=False,
    no_args_is_help=False,
    pretty_exceptions_enable=False,
    rich_markup_mode=None,
)


def main() -> None:
    """Run the command line."""
    for stream in (sys.stdout, sys.stderr):
        if hasattr(stream, "reconfigure"):
            stream.reconfigure(errors="backslashreplace")
    app()


@app.command()
def audit(
    model: Annotated[Path, typer.Argument(metavar="MODEL.ifc", help="The model; it is only read.")],
    actions: Annotated[
        Path | None,
        typer.Option(metavar="FILE", help="Design actions: a CSV table, or an IFC file with analysis results."),
    ] = None,
    config: Annotated[Path | None, typer.Option(metavar="FILE.toml", help="Settings.")] = None,
    out: Annotated[
        Path | None, typer.Option(metavar="DIR", help="Where the results go; <model name>-joints here if not said.")
    ] = None,
    only: Annotated[
        str | None, typer.Option(metavar="GLOB", help='Run only the checks whose name fits, as "bolt_group.*".')
    ] = None,
    pack: Annotated[
        list[str] | None, typer.Option(metavar="NAME", help="Run only this pack's checks; may be given again.")
    ] = None,
    no_ifc: Annotated[bool, typer.Option("--no-ifc", help="Write no model with results in it.")] = False,
    no_html: Annotated[bool, typer.Option("--no-html", help="Write no report.")] = False,
) -> None:
    """Find the bolted joints of a model, check them, and write audit.json, a report and the model with results."""
    with _plain_errors():
        settings = read_settings(config) if config else None
        with _progress() as tell:
            found = run_audit(model, actions=actions, settings=settings, packs=pack or (), only=only, progress=tell)
            tell("writing results", 1.0)
            writers: dict[str, Callable[[Path], None]] = {"audit.json": lambda path: write_audit(found, path)}
            if not no_html:
                writers["report.html"] = lambda path: write_report(found, path)
            if not no_ifc:
                writers[f"{model.stem}.joints.ifc"] = lambda path: write_model(model, path, found)
            inputs = [path for path in (model, actions, config) if path is not None]
            written = write_files(out or Path(f"{model.stem}-joints"), writers, inputs)
        with _printing() as console:
            _print_summary(console, found, written)
        raise typer.Exit(1 if found.failed else 0)


@app.command()
def checks(
    check: Annotated[str | None, typer.Argument(metavar="CHECK", help="Print this check's manual.")] = None,
) -> None:
    """List the installed checks, or print the manual of one."""
    with _plain_errors():
        installed = {each.check.name: each for each in installed_checks()}
        if check is not None and check not in installed:
            raise InputError(f'no check "{check}" is installed; "ifcjoints checks" lists those that are.')
        with _printing() as console:
            if check is None:
                _print_checks(console, list(installed.values()))
            else:
                _print_manual(console, installed[check])


@contextmanager
def _plain_errors() -> Iterator[None]:
    """Say what went wrong in one line; `python -X dev` shows where instead."""
    try:
        yield
    except KeyboardInterrupt:
        _say("interrupted; nothing was written.")
        raise typer.Exit(130) from None
    except IfcJointsError as error:
        _say(str(error))
        raise typer.Exit(2) from None
    except (typer.Exit, typer.Abort):
        raise
    except Exception as error:
        if sys.flags.dev_mode:
            raise
        # Status 1 would say that the audit was done and a joint failed.
        _say(f"unexpected {type(error).__name__}: {error}; please report it with the model that causes it.")
        raise typer.Exit(2) from None


def _say(message: str) -> None:
    print(f"ifcjoints: {_printable(' '.join(message.split()))}", file=sys.stderr)


def _printable(text: str) -> str:
    """Take out what would steer the terminal: a model's names may hold anything."""
    return "".join(character if character.isprintable() else "\N{REPLACEMENT CHARACTER}" for character in text)


@contextmanager
def _progress() -> Iterator[Callable[[str, float], None]]:
    """Yield what is told of the progress; it shows only where standard error is a terminal."""
    console = Console(stderr=True)
    if not console.is_terminal:
        yield lambda _text, _share: None
        return
    columns = TextColumn("{task.description}", markup=False), BarColumn()
    with Progress(*columns, console=console, transient=True) as bar:
        task = bar.add_task("opening the model", total=1.0)
        yield lambda text, share: bar.update(task, description=text, completed=share)


@contextmanager
def _printing() -> Iterator[Console]:
    """Print to standard output; a reader that closes it early does not change the exit status."""
    terminal = sys.stdout.isatty()
    console = Console(markup=False, highlight=False, soft_wrap=not terminal, width=None if terminal else WIDTH_OF_PIPES)
    with console.capture() as captured:
        yield console
    try:
        sys.stdout.write(captured.get())
        sys.stdout.flush()
    except BrokenPipeError:
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())


def _table(*headings: str) -> Table:
    table = Table(box=None, pad_edge=False, padding=(0, 2, 0, 0))
    for heading in headings:
        table.add_column(Text(heading, style="bold"), overflow="fold")
    return table


def _print_summary(console: Console, found: Audit, written: tuple[Path, ...]) -> None:
    counts, joints = count(found), in_short(found)
    if joints:
        table = _table("joint", "kind", "rows", "result", "utilisation", "governing")
        for joint in joints[:LONGEST_SUMMARY]:
            table.add_row(*(Text(_printable(cell)) for cell in _summary_cells(joint)))
        console.print(table)
        if len(joints) > LONGEST_SUMMARY:
            console.print(f"… and {len(joints) - LONGEST_SUMMARY} more in the results.")
        console.print()
    console.print(
        f"{counts.joints} bolted joints, {counts.moment_joints} of them moment joints: {counts.failing} fail, "
        f"{counts.not_checkable} are not wholly checkable; {counts.assumed_inputs} inputs are assumed. "
        f"{found.coverage.bolts} bolts, {counts.bolts_elsewhere} of them in no joint. "
        f"{len(found.problems)} problems of the model and the actions."
    )
    if found.properties_used:
        told = ", ".join(f"{name} ({times})" for name, times in found.properties_used.items())
        console.print(Text(f"Properties read: {_printable(told)}."))
    console.print(words.CAUTION)
    for path in written:
        console.print(str(path))


def _summary_cells(joint: Joint) -> tuple[str, ...]:
    worst = governing_result(joint)
    return (
        joint.name,
        "moment joint" if joint.moment_joint else "other",
        str(len(joint.rows)),
        words.STATUS[joint_status(joint)][1],
        figures.ratio(worst.utilisation) if worst and worst.utilisation is not None else "–",
        decisive(joint) or "–",
    )


def _print_checks(console: Console, installed: list[InstalledCheck]) -> None:
    table = _table("check", "title", "package", "version")
    for each in installed:
        table.add_row(*map(Text, (each.check.name, each.check.title, each.package, each.version)))
    console.print(table)


def _print_manual(console: Console, installed: InstalledCheck) -> None:
    check = installed.check
    console.print(f"{check.name}: {check.title}")
    console.print(f"{installed.package} {installed.version} · {check.method}")
    for heading in HEADINGS:
        console.print(Text(f"\n{heading}", style="bold"))
        console.print(check.manual[heading])
    if check.options.model_fields:
        console.print(Text(f'\nOptions, in [checks."{check.name}"] of the settings', style="bold"))
        for name, field in check.options.model_fields.items():
            console.print(f"{name} = {field.default!r}  {field.description or ''}".rstrip())
