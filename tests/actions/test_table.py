from __future__ import annotations

from pathlib import Path

import pytest

from ifcjoints.actions.table import read_actions
from ifcjoints.errors import ActionsError

HEADER = "member,end,case,N_kN,V_kN,M_kNm\n"
GOOD = "B1,start,LC1,-12.5,80,150.25\n"


def table(folder: Path, content: str | bytes) -> Path:
    path = folder / "loads.csv"
    path.write_bytes(content if isinstance(content, bytes) else content.encode())
    return path


def test_reads_rows_with_their_lines(tmp_path: Path) -> None:
    first, second = read_actions(table(tmp_path, HEADER + GOOD + "\nB1, End ,LC1,0,-8e1,+.5\n"))
    assert (first.line, first.member, first.end, first.action.case) == (2, "B1", "start", "LC1")
    assert (first.action.forces.N_kN, first.action.forces.V_kN, first.action.forces.M_kNm) == (
        -12.5,
        80,
        150.25,
    )
    assert (second.line, second.end, second.action.forces.V_kN, second.action.forces.M_kNm) == (
        4,
        "end",
        -80,
        0.5,
    )
    assert "loads.csv, line 4" in second.action.source


def test_an_empty_end_means_both(tmp_path: Path) -> None:
    assert read_actions(table(tmp_path, HEADER + "B1,,LC1,0,0,1\n"))[0].end is None


@pytest.mark.parametrize(
    "content",
    [
        b"\xef\xbb\xbf" + (HEADER + GOOD).encode(),
        (HEADER + GOOD).replace("\n", "\r\n"),
        "case,M_kNm,V_kN,N_kN,end,member\nLC1,150.25,80,-12.5,start,B1\n",
        HEADER + '"B1","start","LC1","-12.5","80","150.25"\n,,,,,\n',
    ],
    ids=["byte order mark", "CRLF", "columns in another order", "quoted, with a blank line"],
)
def test_reads_the_same_from_other_spellings(tmp_path: Path, content: str | bytes) -> None:
    (row,) = read_actions(table(tmp_path, content))
    assert (row.member, row.end, row.action.case) == ("B1", "start", "LC1")
    assert row.action.forces.model_dump() == {"N_kN": -12.5, "V_kN": 80.0, "M_kNm": 150.25}


@pytest.mark.parametrize(
    ("content", "said"),
    [
        ("", "empty"),
        ("\n\n", "empty"),
        (HEADER, "no line of actions"),
        ("member,end,case,N,V,M\n" + GOOD, 'line 1: the header lacks "N_kN", "V_kN", "M_kNm"'),
        (HEADER.replace("\n", ",T_kNm\n") + GOOD, 'line 1: the header has the unknown column "T_kNm"'),
        (HEADER.replace("\n", ",V_kN\n") + GOOD, 'line 1: the header doubles "V_kN"'),
        (HEADER.replace(",", ";") + GOOD.replace(",", ";"), "line 1: semicolons part the columns"),
        (HEADER.replace(",", "\t"), "line 1: tabs part the columns"),
        (HEADER + "B1,start,LC1,-12,5,80,150\n", "line 2: 7 values stand under 6 columns"),
        (HEADER + 'B1,start,LC1,"-12,5",80,150\n', 'line 2: N_kN is "-12,5", which is no plain number'),
        (HEADER + "B1,start,LC1,0,80\n", "line 2: 5 values"),
        (HEADER + GOOD + "B1,left,LC1,0,0,1\n", 'line 3: the end "left"'),
        (HEADER + ",start,LC1,0,0,1\n", "line 2: the member is not named"),
        (HEADER + "B1,start,,0,0,1\n", "line 2: the case is not named"),
        (HEADER + GOOD + "B2,start,LC1,0,0,1\n" + GOOD, "line 4: this repeats line 2"),
        (HEADER + 'B1,"start,LC1,0,0,1\n', "this is not a CSV line"),
        (HEADER.encode("utf-16"), "not UTF-8"),
        ((HEADER + "Tr\xe4ger,start,LC1,0,0,1\n").encode("latin-1"), "not UTF-8"),
        (HEADER + GOOD + "\0", "not a CSV table"),
    ],
)
def test_names_what_is_wrong(tmp_path: Path, content: str | bytes, said: str) -> None:
    path = table(tmp_path, content)
    with pytest.raises(ActionsError) as caught:
        read_actions(path)
    assert said in str(caught.value)
    assert str(path) in str(caught.value)
    assert "\n" not in str(caught.value)


@pytest.mark.parametrize("text", ["nan", "NaN", "inf", "-Infinity", "1e999", "1_000", "12 kN", "", "٣", "0x1F", "−5"])
@pytest.mark.parametrize("column", [3, 4, 5])
def test_takes_only_plain_finite_numbers(tmp_path: Path, text: str, column: int) -> None:
    cells = ["B1", "start", "LC1", "0", "0", "0"]
    cells[column] = text
    with pytest.raises(ActionsError, match=f"line 2: {HEADER.strip().split(',')[column]} is"):
        read_actions(table(tmp_path, HEADER + ",".join(cells) + "\n"))


def test_a_missing_table_and_a_folder_are_said(tmp_path: Path) -> None:
    for path in (tmp_path / "absent.csv", tmp_path):
        with pytest.raises(ActionsError, match="cannot be read"):
            read_actions(path)
