from __future__ import annotations

import json
import re
import subprocess
import sys
from collections.abc import Callable
from pathlib import Path
from typing import Any, NamedTuple

import ifcopenshell
import pytest

from ifcjoints import cli
from ifcjoints.model.audit import Audit

SAMPLES = sorted((Path(__file__).parent.parent / "sample_models").glob("*.ifc"))
HEADER = "member,end,case,N_kN,V_kN,M_kNm\n"


class Outcome(NamedTuple):
    status: int
    out: str
    err: str


@pytest.fixture
def run(monkeypatch: pytest.MonkeyPatch, capsys: pytest.CaptureFixture[str]) -> Callable[..., Outcome]:
    def command(*arguments: str | Path) -> Outcome:
        monkeypatch.setattr(sys, "argv", ["ifcjoints", *map(str, arguments)])
        with pytest.raises(SystemExit) as caught:
            cli.main()
        return Outcome(caught.value.code or 0, *capsys.readouterr())

    return command


@pytest.fixture(scope="module")
def steelless(tmp_path_factory: pytest.TempPathFactory) -> Path:
    """A model with a wall in it and nothing else."""
    file = ifcopenshell.file(schema="IFC4")
    unit = file.create_entity("IfcSIUnit", UnitType="LENGTHUNIT", Prefix="MILLI", Name="METRE")
    file.create_entity(
        "IfcProject",
        GlobalId="0" + "P" * 21,
        Name="House",
        UnitsInContext=file.create_entity("IfcUnitAssignment", [unit]),
    )
    file.create_entity("IfcWall", GlobalId="0" + "W" * 21, Name="Wall")
    path = tmp_path_factory.mktemp("model") / "house.ifc"
    file.write(str(path))
    return path


def listing(folder: Path) -> dict[str, bytes]:
    return {str(path): path.read_bytes() if path.is_file() else b"" for path in sorted(folder.rglob("*"))}


def one_line(outcome: Outcome) -> str:
    """What a refused input must look like: status 2, one line on standard error, no traceback."""
    assert (outcome.status, outcome.out) == (2, "")
    assert outcome.err.count("\n") == 1
    assert "Traceback" not in outcome.err
    assert "unexpected" not in outcome.err
    return outcome.err


BAD_MODELS: dict[str, bytes | None] = {
    "missing": None,
    "empty": b"",
    "not IFC": b"solid cube\nendsolid cube\n" * 50,
    "binary noise": bytes(range(256)) * 64,
    "truncated": b"ISO-10303-21;\nHEADER;\nFILE_SCHEMA(('IFC4'));\nENDSEC;\nDATA;\n#1=IFCWALL('0",
    "no data": b"ISO-10303-21;\nEND-ISO-10303-21;\n",
    "garbled": b"ISO-10303-21;\nHEADER;\nFILE_SCHEMA(('IFC4'));\nENDSEC;\nDATA;\n" + b"#1=\xff(,,;\n" * 9
    + b"ENDSEC;\nEND-ISO-10303-21;\n",
    "another schema": b"ISO-10303-21;\nHEADER;\nFILE_DESCRIPTION((''),'2;1');\nFILE_NAME('','',(''),(''),'','','');\n"
    b"FILE_SCHEMA(('AUTOMOTIVE_DESIGN'));\nENDSEC;\nDATA;\nENDSEC;\nEND-ISO-10303-21;\n",
}  # fmt: skip


@pytest.mark.parametrize("name", [name for name in BAD_MODELS if name != "garbled"])
def test_a_model_that_cannot_be_used_is_refused_in_one_line(
    run: Callable[..., Outcome], tmp_path: Path, name: str
) -> None:
    model, content = tmp_path / "model.ifc", BAD_MODELS[name]
    if content is not None:
        model.write_bytes(content)
    before = listing(tmp_path)
    assert str(model) in one_line(run("audit", model, "--out", tmp_path / "out"))
    assert listing(tmp_path) == before


def test_a_garbled_model_is_refused_or_honestly_empty(run: Callable[..., Outcome], tmp_path: Path) -> None:
    model = tmp_path / "model.ifc"
    model.write_bytes(BAD_MODELS["garbled"] or b"")
    outcome = run("audit", model, "--out", tmp_path / "out")
    if outcome.status == 0:
        assert json.loads((tmp_path / "out" / "audit.json").read_text())["joints"] == []
    else:
        one_line(outcome)
        assert not (tmp_path / "out").exists()


def test_a_folder_is_no_model(run: Callable[..., Outcome], tmp_path: Path) -> None:
    assert "folder" in one_line(run("audit", tmp_path, "--out", tmp_path / "out"))
    assert list(tmp_path.iterdir()) == []


def test_a_model_without_steel_has_an_honest_empty_result(
    run: Callable[..., Outcome], tmp_path: Path, steelless: Path
) -> None:
    outcome = run("audit", steelless, "--out", tmp_path / "out")
    assert (outcome.status, outcome.err) == (0, "")
    assert "0 bolted joints" in outcome.out
    audit = Audit.model_validate_json((tmp_path / "out" / "audit.json").read_text(encoding="utf-8"))
    assert (audit.joints, audit.coverage.bolts) == ((), 0)
    assert {path.name for path in (tmp_path / "out").iterdir()} == {"audit.json", "report.html", "house.joints.ifc"}


@pytest.mark.parametrize(
    ("content", "said"),
    [
        (HEADER + "B99,start,LC1,0,0,1\n", 'line 2: the model has no member "B99"'),
        (HEADER + "Wall,start,LC1,nan,0,1\n", 'line 2: N_kN is "nan"'),
        ("member,end,case,N,V,M\nWall,start,LC1,0,0,1\n", "line 1: the header lacks"),
        (HEADER.replace(",", ";"), "semicolons"),
        ("", "empty"),
        (None, "cannot be read"),
    ],
)
def test_actions_that_cannot_be_used_are_refused_in_one_line(
    run: Callable[..., Outcome], tmp_path: Path, steelless: Path, content: str | None, said: str
) -> None:
    actions = tmp_path / "loads.csv"
    if content is not None:
        actions.write_text(content)
    before = listing(tmp_path)
    assert said in one_line(run("audit", steelless, "--actions", actions, "--out", tmp_path / "out"))
    assert listing(tmp_path) == before


@pytest.mark.parametrize(
    ("content", "said"),
    [
        ("[basis]\ngamma_M2 = -1\n", "basis.gamma_M2"),
        ("[basis\n", "not TOML"),
        ("[bolts]\n", "bolts"),
        ('[checks."bolt_group.elastic"]\nno_such_option = 1\n', "no_such_option"),
        (None, "cannot be read"),
    ],
)
def test_settings_that_cannot_be_used_are_refused_in_one_line(
    run: Callable[..., Outcome], tmp_path: Path, steelless: Path, content: str | None, said: str
) -> None:
    config = tmp_path / "settings.toml"
    if content is not None:
        config.write_text(content)
    before = listing(tmp_path)
    assert said in one_line(run("audit", steelless, "--config", config, "--out", tmp_path / "out"))
    assert listing(tmp_path) == before


def test_a_folder_that_cannot_be_written_to_is_said(
    run: Callable[..., Outcome], tmp_path: Path, steelless: Path
) -> None:
    (tmp_path / "file").write_text("")
    before = listing(tmp_path)
    for out in (tmp_path / "file", tmp_path / "file" / "deeper"):
        assert str(out) in one_line(run("audit", steelless, "--out", out))
    assert listing(tmp_path) == before


def test_the_model_is_never_replaced(run: Callable[..., Outcome], tmp_path: Path, steelless: Path) -> None:
    config = tmp_path / "report.html"
    config.write_text("")
    assert "input" in one_line(run("audit", steelless, "--config", config, "--out", tmp_path))
    assert [path.name for path in tmp_path.iterdir()] == ["report.html"]


@pytest.mark.parametrize("step", ["run_audit", "write_model", "write_report", "write_audit"])
def test_an_interrupted_run_leaves_nothing_behind(
    run: Callable[..., Outcome], tmp_path: Path, steelless: Path, monkeypatch: pytest.MonkeyPatch, step: str
) -> None:
    def interrupt(*_: Any, **__: Any) -> None:
        raise KeyboardInterrupt

    monkeypatch.setattr(cli, step, interrupt)
    outcome = run("audit", steelless, "--out", tmp_path / "out")
    assert (outcome.status, outcome.out) == (130, "")
    assert list(tmp_path.iterdir()) == []


def test_a_fault_of_our_own_is_not_taken_for_a_failing_joint(
    run: Callable[..., Outcome], tmp_path: Path, steelless: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    def stumble(*_: Any, **__: Any) -> None:
        raise ZeroDivisionError("two\nlines")

    monkeypatch.setattr(cli, "write_report", stumble)
    outcome = run("audit", steelless, "--out", tmp_path / "out")
    assert outcome.status == 2
    assert "unexpected ZeroDivisionError: two lines" in outcome.err
    assert list(tmp_path.iterdir()) == []


def test_results_go_beside_where_it_is_run(
    run: Callable[..., Outcome], tmp_path: Path, steelless: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    monkeypatch.chdir(tmp_path)
    assert run("audit", steelless, "--no-ifc", "--no-html").status == 0
    assert [path.name for path in (tmp_path / "house-joints").iterdir()] == ["audit.json"]


@pytest.mark.parametrize(
    "arguments", [(), ("audit",), ("audit", "a.ifc", "--no-such"), ("paint", "a.ifc"), ("checks", "no.such.check")]
)
def test_wrong_use_ends_with_2(run: Callable[..., Outcome], arguments: tuple[str, ...]) -> None:
    outcome = run(*arguments)
    assert outcome.status == 2
    assert outcome.out == ""
    assert "Traceback" not in outcome.err


def test_a_pack_that_is_not_installed_is_said(run: Callable[..., Outcome], tmp_path: Path, steelless: Path) -> None:
    line = one_line(run("audit", steelless, "--pack", "no_such_pack", "--out", tmp_path / "out"))
    assert "no_such_pack" in line
    assert "ifcjoints_bolt_groups" in line


def test_checks_lists_what_is_installed_and_prints_manuals(run: Callable[..., Outcome]) -> None:
    listed = run("checks")
    assert (listed.status, listed.err) == (0, "")
    for expected in ("bolt_group.elastic", "bolt_group.plastic", "ifcjoints_bolt_groups"):
        assert expected in listed.out
    manual = run("checks", "bolt_group.elastic").out
    for heading in ("What it checks", "Why it matters", "Method and clause", "Needs", "Limits", "Example"):
        assert heading in manual
    assert "[" in run("checks", "bolt_group.plastic").out


def test_names_in_a_model_cannot_steer_the_terminal(run: Callable[..., Outcome], tmp_path: Path) -> None:
    text = SAMPLES[0].read_text(encoding="utf-8")
    model = tmp_path / "model.ifc"
    # Escape, "[2J" and a line break in front of every name that begins with a capital letter and a digit
    model.write_text(re.sub(r"'([A-Z]\d)'", r"'\\X2\\001B\\X0\\[2J\\X2\\000A\\X0\\\1'", text), encoding="utf-8")
    outcome = run("audit", model, "--out", tmp_path / "out")
    assert "[2J" in outcome.out
    assert "\x1b" not in outcome.out
    actions = tmp_path / "loads.csv"
    actions.write_text(HEADER + "\x1b[2J,start,LC1,0,0,1\n")
    assert "\x1b" not in one_line(run("audit", model, "--actions", actions, "--out", tmp_path / "out"))


def test_a_reader_that_stops_early_does_not_change_the_status() -> None:
    command = [sys.executable, "-m", "ifcjoints", "checks"]
    with subprocess.Popen(command, stdout=subprocess.PIPE, stderr=subprocess.PIPE) as process:
        assert process.stdout
        assert process.stderr
        process.stdout.close()
        assert process.stderr.read() == b""
        assert process.wait(timeout=120) == 0


def test_the_console_script_runs() -> None:
    script = Path(sys.executable).with_name("ifcjoints")
    done = subprocess.run([script, "audit", "absent.ifc"], capture_output=True, text=True, check=False, timeout=120)
    one_line(Outcome(done.returncode, done.stdout, done.stderr))


@pytest.fixture(scope="module")
def written(tmp_path_factory: pytest.TempPathFactory) -> Callable[[Path], Path]:
    """Audit a sample model with its actions once, and hand out the folder of results."""
    done: dict[Path, Path] = {}

    def results(model: Path) -> Path:
        if model not in done:
            done[model] = tmp_path_factory.mktemp(model.stem)
            actions = model.with_suffix(".actions.csv")
            command = [
                sys.executable,
                "-m",
                "ifcjoints",
                "audit",
                model,
                "--actions",
                actions,
                "--out",
                done[model],
            ]
            finished = subprocess.run(command, capture_output=True, text=True, check=False, timeout=600)
            audit = Audit.model_validate_json((done[model] / "audit.json").read_text(encoding="utf-8"))
            assert finished.returncode == (1 if audit.failed else 0), finished.stderr
            assert finished.stderr == ""
        return done[model]

    return results


def test_there_are_sample_models() -> None:
    assert len(SAMPLES) >= 3


@pytest.mark.parametrize("model", SAMPLES, ids=lambda path: path.stem)
class TestSampleModels:
    def test_everything_that_stood_in_the_model_stands_there_unchanged(
        self, model: Path, written: Callable[[Path], Path]
    ) -> None:
        before = ifcopenshell.open(str(model))
        after = ifcopenshell.open(str(written(model) / f"{model.stem}.joints.ifc"))
        told = {entity.id(): str(entity) for entity in after}
        assert len(told) > sum(1 for _ in before)
        assert {entity.id(): told.get(entity.id()) for entity in before} == {
            entity.id(): str(entity) for entity in before
        }

    def test_writing_twice_is_writing_once(self, model: Path, written: Callable[[Path], Path], tmp_path: Path) -> None:
        once = written(model) / f"{model.stem}.joints.ifc"
        actions = model.with_suffix(".actions.csv")
        command = [sys.executable, "-m", "ifcjoints", "audit", once, "--actions", actions, "--out", tmp_path]
        assert subprocess.run(command, capture_output=True, check=False, timeout=600).returncode in (0, 1)
        assert (tmp_path / f"{once.stem}.joints.ifc").read_bytes() == once.read_bytes()

    def test_each_joint_has_one_group(self, model: Path, written: Callable[[Path], Path]) -> None:
        audit = Audit.model_validate_json((written(model) / "audit.json").read_text(encoding="utf-8"))
        file = ifcopenshell.open(str(written(model) / f"{model.stem}.joints.ifc"))
        kinds = [
            group.ObjectType for group in file.by_type("IfcGroup") if group.ObjectType in ("MOMENT_JOINT", "JOINT")
        ]
        assert len(kinds) == len(audit.joints) > 0
        assert kinds.count("MOMENT_JOINT") == sum(joint.moment_joint for joint in audit.joints) > 0

    def test_the_report_names_every_joint(self, model: Path, written: Callable[[Path], Path]) -> None:
        audit = Audit.model_validate_json((written(model) / "audit.json").read_text(encoding="utf-8"))
        page = (written(model) / "report.html").read_text(encoding="utf-8")
        assert all(joint.id in page for joint in audit.joints)
        assert page.count("<svg") == sum(
            bool(joint.rows and joint.interface) and joint.moment_joint for joint in audit.joints
        )
