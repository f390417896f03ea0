# The two commands of the README: `make demo` and `make test`. Both make .venv first.
PYTHON ?= python3
BIN := .venv/bin

.PHONY: demo test lint samples clean

.venv/installed: pyproject.toml
	$(PYTHON) -m venv .venv
	$(BIN)/python -m pip install --quiet --disable-pip-version-check --editable '.[dev]'
	touch $@

demo: .venv/installed
	$(BIN)/python -m sample_models.demo

test: .venv/installed
	$(BIN)/ruff check .
	$(BIN)/mypy
	$(BIN)/pytest -n auto

samples: .venv/installed
	$(BIN)/python -m sample_models.make

clean:
	rm -rf .venv
