"""Solvers: any plan area and any flow against level, no vessels, outlets or words."""
