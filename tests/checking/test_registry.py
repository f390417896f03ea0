"""What is installed is told truly; what cannot be loaded is named."""

from types import SimpleNamespace

import pytest

from ifcjoints.checking import registry
from ifcjoints.checking.registry import installed_checks
from ifcjoints.errors import CheckRegistrationError, SettingsError

from .made import NAME, made


def point(load, name=NAME, pack="made_pack", version=None):
    """Stand in for an entry point."""
    dist = SimpleNamespace(version=version) if version else None
    return SimpleNamespace(name=name, value=f"{pack}.x:y", module=f"{pack}.x", dist=dist, load=load)


@pytest.fixture
def install(monkeypatch):
    """Return a function that makes these entry points the only ones of the group."""

    def put(*points):
        monkeypatch.setattr(registry, "entry_points", lambda group: points if group == "ifcjoints.checks" else ())

    return put


def test_the_built_in_pack_comes_through_the_entry_points():
    found = installed_checks(["ifcjoints_bolt_groups"])
    assert [each.check.name for each in found] == ["bolt_group.elastic", "bolt_group.plastic"]
    assert {each.package for each in found} == {"ifcjoints_bolt_groups"}


def test_a_pack_that_is_not_installed_is_named_beside_those_that_are():
    with pytest.raises(SettingsError, match=r'"ifcjoints_nowhere".*ifcjoints_bolt_groups'):
        installed_checks(["ifcjoints_nowhere"])


def test_a_glob_limits_the_checks():
    assert [each.check.name for each in installed_checks(only="*.elastic")] == ["bolt_group.elastic"]
    assert installed_checks(only="*.ELASTIC") == []


def test_checks_stand_by_name_with_their_package_and_version(install, monkeypatch):
    first, second = made(monkeypatch, name="a.check"), made(monkeypatch, name="b.check")
    install(point(lambda: second, "b.check", "pack_b", "2.1"), point(lambda: first, "a.check", "pack_a"))
    told = [(each.check.name, each.package, each.version) for each in installed_checks()]
    assert told == [("a.check", "pack_a", "unknown"), ("b.check", "pack_b", "2.1")]


def test_only_the_packs_asked_for_are_loaded(install, monkeypatch):
    good = made(monkeypatch)
    install(point(lambda: good), point(broken, "other.check", "pack_b"))
    assert [each.check for each in installed_checks(["made_pack"])] == [good]


def broken():
    raise ImportError("no module named nothing")


def spoilt():
    raise CheckRegistrationError("made.check: add a case that ends as fail.")


@pytest.mark.parametrize(
    ("load", "text"),
    [
        (broken, r"made\.check \(made_pack\.x:y\) cannot be loaded: no module named nothing"),
        (spoilt, "^made.check: add a case that ends as fail"),
        (lambda: "no check", "does not name a check of that name"),
    ],
)
def test_an_entry_point_that_gives_no_check_is_named(install, load, text):
    install(point(load))
    with pytest.raises(CheckRegistrationError, match=text):
        installed_checks()


def test_a_check_goes_by_one_name(install, monkeypatch):
    check = made(monkeypatch, name="its.own_name")
    install(point(lambda: check, "another.name"))
    with pytest.raises(CheckRegistrationError, match=r"another\.name .*does not name a check of that name"):
        installed_checks()


def test_options_of_a_check_that_is_not_installed_are_refused():
    with pytest.raises(SettingsError, match=r"bolt_group\.plastc.*bolt_group\.plastic"):
        registry.refuse_unknown(["bolt_group.plastc"])
    registry.refuse_unknown(["bolt_group.plastic"])
