"""How numbers are written for people: rounded as the trade does, never rounded across a limit.

Forces and moments to 0.1 kN and 0.1 kNm, lengths to 0.1 mm. A utilisation is rounded *up* to 0.01, so
that 1.004, which fails, reads 1.01 and never a passing 1.00.
"""

from __future__ import annotations

import math

MINUS = "−"


def utilisation_up(value: float) -> float:
    """Round a utilisation up to 0.01; above 1 it is never less than 1.01."""
    hundredths = math.ceil(round(value * 100, 6))
    return max(hundredths, 101) / 100 if value > 1.0 else hundredths / 100


def share_down(value: float) -> float:
    """Round a share of 0 to 1 down to 0.01, so that 1 means all of it."""
    return min(math.floor(round(value * 100, 6)), 99 if value < 1.0 else 100) / 100


def tenths(value: float) -> str:
    """Write a force in kN, a moment in kNm or a length in mm to one decimal."""
    return _signed(f"{value:.1f}")


def ratio(value: float) -> str:
    """Write a utilisation, rounded up."""
    return _signed(f"{utilisation_up(value):.2f}")


def percent(value: float) -> str:
    """Write a share of 0 to 1, rounded down."""
    return f"{share_down(value) * 100:.0f} %"


def apart(value: float, limit: float) -> tuple[str, str]:
    """Write a figure and its limit with as many decimals as tell them apart, one at least."""
    for decimals in range(1, 10):
        texts = _signed(f"{value:.{decimals}f}"), _signed(f"{limit:.{decimals}f}")
        if texts[0] != texts[1] or value == limit:
            return texts
    return repr(value), repr(limit)


def plain(value: float) -> str:
    """Write a figure of a calculation: five significant digits, whole from 10 000 on."""
    if value == 0:
        return "0"
    decimals = max(0, 4 - math.floor(math.log10(abs(value))))
    text = f"{value:.{decimals}f}"
    return _signed(text.rstrip("0").rstrip(".") if "." in text else text)


def _signed(text: str) -> str:
    """Set a true minus, and none before a zero."""
    digits = text.removeprefix("-")
    negative = digits != text and digits.strip("0.") != ""
    return f"{MINUS}{digits}" if negative else digits
