from __future__ import annotations

import os
from collections.abc import Callable
from pathlib import Path

import pytest

from ifcjoints.errors import OutputError
from ifcjoints.publishing.files import write_files


def listing(folder: Path) -> dict[str, str]:
    return {str(path): path.read_text() if path.is_file() else "" for path in sorted(folder.rglob("*"))}


def writing(text: str) -> Callable[[Path], None]:
    def write(path: Path) -> None:
        path.write_text(text)

    return write


def failing(error: BaseException) -> Callable[[Path], None]:
    def write(path: Path) -> None:
        path.write_text("half")
        raise error

    return write


def test_writes_every_file_and_nothing_else(tmp_path: Path) -> None:
    folder = tmp_path / "out" / "deeper"
    written = write_files(folder, {"a": writing("1"), "b": writing("2")})
    assert written == (folder / "a", folder / "b")
    assert {path.name for path in folder.iterdir()} == {"a", "b"}
    write_files(folder, {"a": writing("3")})
    assert {path.name: path.read_text() for path in folder.iterdir()} == {"a": "3", "b": "2"}


@pytest.mark.parametrize(
    "error", [OSError(28, "No space left on device"), KeyboardInterrupt(), ValueError("x"), OutputError("y")]
)
@pytest.mark.parametrize("standing", [True, False])
def test_leaves_the_folder_as_it_was_when_a_file_cannot_be_written(
    tmp_path: Path, error: BaseException, standing: bool
) -> None:
    folder = tmp_path / "out" / "deeper"
    if standing:
        write_files(folder, {"a": writing("old")})
    before = listing(tmp_path)
    expected = OutputError if isinstance(error, OSError) else type(error)
    with pytest.raises(expected):
        write_files(folder, {"a": writing("new"), "b": failing(error)})
    assert listing(tmp_path) == before


def test_a_file_where_the_folder_belongs_is_said(tmp_path: Path) -> None:
    (tmp_path / "file").write_text("")
    before = listing(tmp_path)
    for folder in (tmp_path / "file", tmp_path / "file" / "deeper"):
        with pytest.raises(OutputError, match="file"):
            write_files(folder, {"a": writing("1")})
    assert listing(tmp_path) == before


@pytest.mark.skipif(os.name == "nt" or os.geteuid() == 0, reason="the superuser may write everywhere")
def test_an_unwritable_folder_is_said(tmp_path: Path) -> None:
    tmp_path.chmod(0o500)
    try:
        for folder in (tmp_path, tmp_path / "new"):
            with pytest.raises(OutputError, match="Permission denied"):
                write_files(folder, {"a": writing("1")})
        assert list(tmp_path.iterdir()) == []
    finally:
        tmp_path.chmod(0o700)


def test_a_folder_in_the_place_of_a_file_is_said(tmp_path: Path) -> None:
    (tmp_path / "b").mkdir()
    with pytest.raises(OutputError, match="b: a folder stands"):
        write_files(tmp_path, {"a": writing("1"), "b": writing("2")})
    assert [path.name for path in tmp_path.iterdir()] == ["b"]


def test_an_input_is_never_replaced(tmp_path: Path) -> None:
    given = tmp_path / "model.ifc"
    given.write_text("model")
    (tmp_path / "link").symlink_to(given)
    for name in ("model.ifc", "link"):
        with pytest.raises(OutputError, match="would replace an input"):
            write_files(tmp_path, {name: writing("1")}, inputs=[given])
    assert given.read_text() == "model"
