from __future__ import annotations

import re
from html.parser import HTMLParser
from pathlib import Path

import pytest

from ifcjoints.model.findings import Finding
from ifcjoints.publishing import words
from ifcjoints.publishing.report import flattened, render_report, symbols, write_report

from . import examples

VOID = {"meta", "br", "link", "img", "hr", "input"}


class Reader(HTMLParser):
    """Collects a page's tags and visible text, and holds that every tag is closed."""

    def __init__(self, page: str) -> None:
        super().__init__()
        self.tags: list[tuple[str, dict[str, str | None]]] = []
        self.open: list[str] = []
        self.words: list[str] = []
        self.feed(page)
        self.close()
        assert self.open == []

    def handle_starttag(self, tag: str, attrs: list[tuple[str, str | None]]) -> None:
        self.tags.append((tag, dict(attrs)))
        if tag not in VOID:
            self.open.append(tag)

    def handle_startendtag(self, tag: str, attrs: list[tuple[str, str | None]]) -> None:
        self.tags.append((tag, dict(attrs)))

    def handle_endtag(self, tag: str) -> None:
        assert self.open.pop() == tag
        if tag in ("td", "th", "dt", "dd", "li"):
            self.words.append(" ")

    def handle_data(self, data: str) -> None:
        if "style" not in self.open:
            self.words.append(data)

    @property
    def text(self) -> str:
        return " ".join("".join(self.words).split())


@pytest.fixture(scope="module")
def page() -> str:
    return render_report(examples.audit())


@pytest.fixture(scope="module")
def reader(page: str) -> Reader:
    return Reader(page)


def test_what_comes_from_the_model_is_text_and_never_a_tag(page: str, reader: Reader) -> None:
    assert "<script" not in page
    assert not {"script", "iframe", "object", "img", "link"} & {tag for tag, _ in reader.tags}
    assert reader.text.count(examples.HOSTILE) >= 10


def test_one_file_without_network(page: str, reader: Reader) -> None:
    for tag, attributes in reader.tags:
        for name in ("src", "href", "action", "data", "srcset"):
            assert (attributes.get(name) or "#").startswith("#"), (tag, attributes)
    assert not re.search(r"url\(|@import", page)


def test_the_head_says_what_was_checked_and_to_what(reader: Reader) -> None:
    for expected in (
        "2 bolted joints", "1 moment joint ", "1 fail", "1 not wholly checkable", "1 input assumed",
        "5 of 16 bolts in no joint", "EN 1993-1-8:2005", "ab" * 32, "cd" * 32, words.CAUTION,
    ):  # fmt: skip
        assert expected in reader.text


def test_every_figure_of_a_joint_is_shown(reader: Reader) -> None:
    joint = examples.moment_joint()
    for expected in (
        joint.why, "441.0", "331.0", "58.0", "−52.2", "110.0", "180.2", "120.8", "301.0", "M = 120.0 kNm", "0.84",
        "ASSUMED", "edge-distance", "29.98, limit 30.00", "grade not known", "below the bottom flange",
        "0.9·1000·353 / 1.25 = 254.16 kN", "EN 1993-1-8:2005, Table 3.4", "fillet, throat 7.0 mm", "85 %",
        "A fin plate meets the web only.", "Anchors in concrete", "A body that is not closed", "basis.gamma_M2 1.25",
        f"Set.{examples.HOSTILE} 7",
    ):  # fmt: skip
        assert expected in reader.text


def test_a_status_is_a_word_and_a_sign_not_a_colour_alone(reader: Reader) -> None:
    for key in ("pass", "fail", "resistance_only", "not_checkable"):
        assert " ".join(words.STATUS[key]) in reader.text


def test_a_failing_utilisation_never_reads_one(reader: Reader) -> None:
    assert "1.0004" not in reader.text
    assert "1.01" in reader.text
    assert "1.00 " not in reader.text


def test_every_link_leads_somewhere(reader: Reader) -> None:
    places = {attributes["id"] for _, attributes in reader.tags if "id" in attributes}
    links = {str(attributes["href"])[1:] for tag, attributes in reader.tags if tag == "a"}
    assert links
    assert links <= places


def test_an_empty_model_has_an_honest_report() -> None:
    audit = examples.audit().model_copy(update={"joints": (), "elsewhere": (), "problems": ()})
    assert "The model holds no bolted joint." in Reader(render_report(audit)).text


def test_a_result_with_too_few_row_forces_shows_a_gap_not_a_figure() -> None:
    joint = examples.moment_joint(checks=(examples.result(row_forces_kN=(180.25,)),))
    text = Reader(render_report(examples.audit(joint))).text
    assert "LC1 1 180.2 2 – 3 – 4 – Compression 301.0" in text


def test_many_cases_are_all_shown() -> None:
    checks = tuple(examples.result(case=f"LC{number}", row_forces_kN=(number, 0, 0, 0)) for number in range(100, 117))
    text = Reader(render_report(examples.audit(examples.moment_joint(checks=checks)))).text
    for number in range(100, 117):
        assert text.count(f"LC{number}") == 3
        assert f"{number}.0" in text


def test_every_setting_is_shown_by_its_name() -> None:
    settings = {"basis": {"standard": None, "gamma_M2": 1.25}, "checks": {}, "table": [{"a": 1, "b": "x"}, {"a": 2}]}
    assert dict(flattened(settings)) == {
        "basis.standard": "not set",
        "basis.gamma_M2": "1.25",
        "checks": "{}",
        "table, row 1": "a 1; b x",
        "table, row 2": "a 2",
    }


def test_findings_of_simple_joints_are_shown() -> None:
    finding = Finding(code="short-bolt", severity="error", message="A bolt is too short.")
    text = Reader(render_report(examples.audit(examples.simple_joint(findings=(finding,))))).text
    assert "A bolt is too short." in text
    assert "✗ fails" in text


@pytest.mark.parametrize(
    ("text", "shown"),
    [
        ("F_t,Rd", "F<sub>t,Rd</sub>"),
        ("k_2·f_ub·A_s / γ_M2", "k<sub>2</sub>·f<sub>ub</sub>·A<sub>s</sub> / γ<sub>M2</sub>"),
        ("min(F_T,1,Rd; 2·F_t,Rd)", "min(F<sub>T,1,Rd</sub>; 2·F<sub>t,Rd</sub>)"),
        ("a<b_c", "a&lt;b<sub>c</sub>"),
        ("plain", "plain"),
    ],
)
def test_symbols_get_their_subscripts(text: str, shown: str) -> None:
    assert str(symbols(text)) == shown


def test_the_report_is_utf8_whatever_the_model_holds(tmp_path: Path) -> None:
    write_report(examples.audit(examples.moment_joint(name="\ud800 \x00 \u202e")), tmp_path / "report.html")
    assert (tmp_path / "report.html").read_bytes().decode("utf-8").startswith("<!doctype html>")
