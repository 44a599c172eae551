"""The look of Qt's own widgets, from the roles of a theme: a palette and a style sheet."""

from __future__ import annotations

from string import Template

from PySide6.QtGui import QPalette
from PySide6.QtWidgets import QApplication, QStyleFactory, QWidget

from headfall_app.paint.fonts import font
from headfall_app.paint.theme import Theme

_ROLES = {
    QPalette.ColorRole.Window: "panel",
    QPalette.ColorRole.WindowText: "ink",
    QPalette.ColorRole.Base: "field",
    QPalette.ColorRole.AlternateBase: "panel",
    QPalette.ColorRole.Text: "ink",
    QPalette.ColorRole.Button: "panel",
    QPalette.ColorRole.ButtonText: "ink",
    QPalette.ColorRole.BrightText: "on_limit",
    QPalette.ColorRole.Highlight: "accent",
    QPalette.ColorRole.HighlightedText: "on_accent",
    QPalette.ColorRole.Link: "accent",
    QPalette.ColorRole.LinkVisited: "accent",
    QPalette.ColorRole.ToolTipBase: "surface",
    QPalette.ColorRole.ToolTipText: "ink",
    QPalette.ColorRole.PlaceholderText: "muted",
    QPalette.ColorRole.Light: "surface",
    QPalette.ColorRole.Midlight: "hair",
    QPalette.ColorRole.Mid: "edge",
    QPalette.ColorRole.Dark: "edge",
    QPalette.ColorRole.Shadow: "ground",
    QPalette.ColorRole.Accent: "accent",
}

# Paddings give way to thicker borders, so that a text does not move when its field gets the cursor. The ring is the
# cursor's alone: a field that is only pointed at has a mark at its left edge.
_SHEET = Template("""
QWidget#entry, QWidget#head { background: $panel; }
QScrollArea#entry { border: 0; border-right: 1px solid $hair; }
QWidget#head { border-bottom: 1px solid $hair; }
QWidget#page { background: $surface; }
QLabel { color: $ink; background: transparent; }
QLabel#echo, QLabel#beside, QLabel#remark, QLabel#saved { color: $muted; }
QLabel#reason { color: $limit; }
QFrame#rule { background: $hair; border: 0; }

QLineEdit, QComboBox {
    color: $ink; background: $field; border: 1px solid $edge; border-radius: 2px; padding: 0 5px;
    placeholder-text-color: $muted; selection-background-color: $accent; selection-color: $on_accent;
}
QLineEdit:hover, QComboBox:hover { border-color: $ink; }
QLineEdit[untyped="true"], QComboBox[untyped="true"] { background: $panel; color: $muted; }
QLineEdit[lit="true"], QComboBox[lit="true"] { border-left: 3px solid $accent; padding: 0 5px 0 3px; }
QLineEdit:focus, QComboBox:focus {
    border: 2px solid $accent; padding: 0 4px; background: $field;
}
QLineEdit[wrong="true"], QComboBox[wrong="true"] {
    border: 2px solid $limit; padding: 0 4px; background: $limit_soft; color: $ink;
}
QComboBox::drop-down { border: 0; width: 20px; }
QComboBox::down-arrow { image: none; }
QComboBox QAbstractItemView {
    color: $ink; background: $field; border: 1px solid $edge; outline: 0;
    selection-background-color: $accent; selection-color: $on_accent;
}
QComboBox QAbstractItemView::item { min-height: 24px; padding: 0 7px; }

QTableView {
    color: $ink; background: $field; border: 1px solid $edge; border-radius: 2px; gridline-color: $hair;
    selection-background-color: $accent_soft; selection-color: $ink; outline: 0;
}
QTableView:focus { border-color: $accent; selection-background-color: $accent; selection-color: $on_accent; }
QTableView QLineEdit { border: 2px solid $accent; border-radius: 0; padding: 0 1px; }
QHeaderView { background: $panel; border: 0; }
QHeaderView::section {
    background: $panel; color: $muted; border: 0; border-bottom: 1px solid $hair; border-right: 1px solid $hair;
    padding: 1px 4px;
}
QTableCornerButton::section { background: $panel; border: 0; border-bottom: 1px solid $hair; }

QPushButton#link {
    color: $muted; background: transparent; border: 2px solid transparent; border-radius: 2px; padding: 0 1px;
}
QPushButton#link:hover { color: $accent; text-decoration: underline; }
QPushButton#link:focus { border-color: $accent; color: $accent; }
QPushButton {
    color: $ink; background: $field; border: 1px solid $edge; border-radius: 2px; padding: 4px 14px; min-height: 18px;
}
QPushButton:hover { border-color: $ink; }
QPushButton:disabled { color: $stale; border-color: $hair; background: $panel; }
QPushButton:focus, QPushButton:default:focus { border: 2px solid $accent; padding: 3px 13px; }

QMenuBar { background: transparent; color: $ink; border: 0; }
QMenuBar::item { background: transparent; padding: 4px 10px; border-radius: 2px; }
QMenuBar::item:selected { background: $accent; color: $on_accent; }
QMenu { background: $surface; color: $ink; border: 1px solid $edge; padding: 4px 0; }
QMenu::item { padding: 5px 28px 5px 26px; }
QMenu::item:selected { background: $accent; color: $on_accent; }
QMenu::item:disabled { color: $stale; }
QMenu::separator { height: 1px; background: $hair; margin: 4px 0; }
QMenu::indicator { width: 8px; height: 8px; left: 10px; border-radius: 5px; border: 1px solid $edge; }
QMenu::indicator:checked { background: $accent; border-color: $accent; }
QMenu::indicator:checked:selected { background: $on_accent; }

QWidget#message { background: $surface; border-bottom: 1px solid $hair; }
QLabel#message_text { color: $ink; }
QLabel#message_title { color: $limit; }
QLabel#notice {
    background: $surface; color: $ink; border: 1px solid $edge; border-left: 3px solid $accent; border-radius: 2px;
    padding: 8px 14px;
}
QTextBrowser { background: $surface; color: $ink; border: 0; selection-background-color: $accent;
    selection-color: $on_accent; }
QDialog, QMessageBox { background: $panel; }
QToolTip { background: $surface; color: $ink; border: 1px solid $edge; padding: 4px; }

QScrollBar:vertical { background: transparent; width: 10px; margin: 0; }
QScrollBar::handle:vertical { background: $edge; border-radius: 4px; min-height: 32px; margin: 1px; }
QScrollBar::handle:vertical:hover { background: $muted; }
QScrollBar::add-line, QScrollBar::sub-line, QScrollBar::add-page, QScrollBar::sub-page {
    height: 0; background: transparent;
}
""")


def palette_of(theme: Theme) -> QPalette:
    """Return the palette of a theme; disabled text is greyed."""
    palette = QPalette()
    for role, name in _ROLES.items():
        palette.setColor(role, theme.colour(name))
    for role in (QPalette.ColorRole.Text, QPalette.ColorRole.WindowText, QPalette.ColorRole.ButtonText):
        palette.setColor(QPalette.ColorGroup.Disabled, role, theme.colour("stale"))
    return palette


def style_sheet(theme: Theme) -> str:
    """Return the style sheet of a theme."""
    return _SHEET.substitute(theme.roles)


def prepare_application(application: QApplication) -> None:
    """Give the application our style and face; once, before the first window."""
    application.setStyle(QStyleFactory.create("Fusion"))
    application.setFont(font(13))


def dress(window: QWidget, theme: Theme) -> None:
    """Give a window and its pop-ups the colours of a theme."""
    palette = palette_of(theme)
    QApplication.setPalette(palette)
    window.setPalette(palette)
    window.setStyleSheet(style_sheet(theme))
