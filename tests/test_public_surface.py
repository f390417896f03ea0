"""What the package shows is what is listed here, and all of it is documented."""

import inspect

import ifcjoints
from ifcjoints import errors

SURFACE = {
    "Action", "Audit", "Finding", "Joint", "Problem", "Result", "Settings", "Step",
    "audit", "check", "read_settings", "write_back",
}  # fmt: skip


def test_the_surface_is_as_listed():
    assert set(ifcjoints.__all__) == SURFACE


def test_everything_public_is_documented():
    for name in SURFACE:
        assert inspect.getdoc(getattr(ifcjoints, name)), name


def test_every_error_stands_in_the_tree():
    family = [each for each in vars(errors).values() if inspect.isclass(each) and issubclass(each, Exception)]
    assert len(family) > 5
    for each in family:
        assert each.__name__ in errors.__doc__
        assert issubclass(each, errors.IfcJointsError)
