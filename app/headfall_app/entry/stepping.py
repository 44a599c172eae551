"""Stepping a typed number up and down by its second significant digit."""

from __future__ import annotations

from decimal import Decimal, InvalidOperation


def number_in(text: str, unit: str) -> Decimal | None:
    """Return the number a typed text begins with, as it was typed; None for a fraction or feet and inches."""
    number = text.strip().removesuffix(unit).strip().replace("\u2212", "-").replace(",", ".")
    try:
        value = Decimal(number)
    except InvalidOperation:
        return None
    return value if value.is_finite() else None


def stepped(value: Decimal, steps: int) -> Decimal:
    """Return the number some steps up, a step being one of its second significant digit: 80 → 81, 1.8 → 1.9."""
    exponent = value.adjusted() - 1 if value else 0
    return value + steps * Decimal(1).scaleb(exponent)


def written(value: Decimal, like: str) -> str:
    """Write the number plainly, without an exponent, with the decimal comma where the text before had one."""
    text = f"{value:f}"
    if "." in text:
        text = text.rstrip("0").rstrip(".") if value == value.to_integral_value() else text
    return text.replace(".", ",") if "," in like else text
