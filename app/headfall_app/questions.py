"""The only things that stop a person: choosing a file, and the question before unsaved work is left."""

from __future__ import annotations

from pathlib import Path

from PySide6.QtWidgets import QFileDialog, QMessageBox, QWidget

CASES = "Headfall cases (*.headfall)"
SHEETS = "PDF (*.pdf)"
TABLES = "CSV (*.csv)"
SAVE, LEAVE, STAY = "save", "leave", "stay"


class Questions:
    """Asks a person; a test puts its own answers in place."""

    def file_to_open(self, parent: QWidget, folder: str) -> Path | None:
        """Ask which case file to open; None when nobody chose one."""
        name, _ = QFileDialog.getOpenFileName(parent, "Open a case", folder, f"{CASES};;All files (*)")
        return Path(name) if name else None

    def file_to_save(self, parent: QWidget, suggested: str) -> Path | None:
        """Ask where to save the case; None when nobody chose a place."""
        name, _ = QFileDialog.getSaveFileName(parent, "Save the case", suggested, CASES)
        return _with_suffix(name, ".headfall")

    def sheet_to_write(self, parent: QWidget, suggested: str) -> Path | None:
        """Ask where to write the sheet; None when nobody chose a place."""
        name, _ = QFileDialog.getSaveFileName(parent, "Export the sheet as PDF", suggested, SHEETS)
        return _with_suffix(name, ".pdf")

    def table_to_write(self, parent: QWidget, suggested: str) -> Path | None:
        """Ask where to write a table; None when nobody chose a place."""
        name, _ = QFileDialog.getSaveFileName(parent, "Export the table as CSV", suggested, TABLES)
        return _with_suffix(name, ".csv")

    def unsaved(self, parent: QWidget, title: str) -> str:
        """Ask what becomes of unsaved work: ``save``, ``leave`` or ``stay``."""
        box = QMessageBox(parent)
        box.setWindowTitle("Headfall")
        box.setText(f"{title} has changes that no file holds.")
        box.setInformativeText("Save them, leave without them, or stay here.")
        save = box.addButton("Save", QMessageBox.ButtonRole.AcceptRole)
        leave = box.addButton("Leave without saving", QMessageBox.ButtonRole.DestructiveRole)
        stay = box.addButton("Stay here", QMessageBox.ButtonRole.RejectRole)
        box.setDefaultButton(save)
        box.setEscapeButton(stay)
        box.exec()
        clicked = box.clickedButton()
        box.deleteLater()
        return SAVE if clicked is save else LEAVE if clicked is leave else STAY


def _with_suffix(name: str, suffix: str) -> Path | None:
    if not name:
        return None
    path = Path(name)
    return path if path.suffix.lower() == suffix else path.with_name(path.name + suffix)
