# make demo | test | lint | bench | wheel-test | clean. Each installs what it needs into .venv first.

UNIT = schemas/examples/land-rig.yaml
JOB = replace-hoses
ON = upper-pipe-rams
WORKERS = auto

BIN = .venv/bin
INSTALLED = .venv/.installed
WHEEL_BIN = .venv-wheel/bin
PIP_ENV = PIP_DISABLE_PIP_VERSION_CHECK=1 PIP_QUIET=2

.DEFAULT_GOAL := demo
.PHONY: demo test lint unit-test bench wheel-test clean pdf-libraries browser

demo: $(INSTALLED) pdf-libraries  ## A permit as PDF, HTML and JSON, in out/
	@mkdir -p out
	$(BIN)/provenzero permit $(UNIT) --job $(JOB) --on $(ON) --out out --format pdf,html,json
	@ls -l out

test: lint unit-test wheel-test  ## Everything that must hold

lint: $(INSTALLED)  ## Style, types, directions of imports
	$(BIN)/ruff check
	$(BIN)/ruff format --check
	$(BIN)/mypy
	$(BIN)/lint-imports --no-cache --no-logo

unit-test: $(INSTALLED) pdf-libraries browser  ## The suite against the checkout
	$(BIN)/pytest -n $(WORKERS)

bench: $(INSTALLED) pdf-libraries  ## Times and memory of the commands
	$(BIN)/python tests/bench/bench.py

# The wheel is built from the source archive, so that a file missing in either is missed here; the environment
# holds what the package itself asks for and the tools of the tests, nothing else.
wheel-test: $(INSTALLED) pdf-libraries  ## The suite against what is installed from the wheel
	@echo "Testing the wheel in .venv-wheel"
	@sh .ci/venv .venv-wheel
	@built=$$(mktemp -d) && trap 'rm -rf "$$built"' EXIT && \
	{ $(BIN)/python -m build --outdir "$$built" >"$$built/log" 2>&1 || { cat "$$built/log"; exit 1; }; } && \
	$(PIP_ENV) $(WHEEL_BIN)/python -m pip install 'pip>=25.1' && \
	$(PIP_ENV) $(WHEEL_BIN)/python -m pip install "$$built"/*.whl --group test && \
	$(PIP_ENV) $(WHEEL_BIN)/python -m pip install --force-reinstall --no-deps "$$built"/*.whl
	$(WHEEL_BIN)/pytest -n $(WORKERS) -p no:cacheprovider tests/unit $(wildcard tests/acceptance)

clean:  ## Away with all that was built or installed here
	rm -rf .venv .venv-wheel build dist generator/*.egg-info .mypy_cache .ruff_cache .pytest_cache .hypothesis

pdf-libraries: $(INSTALLED)
	@sh .ci/system-libraries pdf

browser: $(INSTALLED)
	@sh .ci/system-libraries browser

# pip before 25.1 knows no dependency groups: it is brought up to date first.
$(INSTALLED): pyproject.toml .ci/venv
	@echo "Installing into .venv"
	@sh .ci/venv .venv
	@$(PIP_ENV) $(BIN)/python -m pip install 'pip>=25.1'
	@$(PIP_ENV) $(BIN)/python -m pip install --editable . --group dev
	@touch $@
