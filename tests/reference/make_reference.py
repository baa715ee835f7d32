#!/usr/bin/env python3
"""Makes the reference abundances of tests/reference.rs: one command, from the top
of the repository, with NumPy and SciPy installed:

    python3 tests/reference/make_reference.py

For each run it (1) evaluates every rate coefficient with its own laws
(laws.py), (2) compares each with the table of `duskwater rates RUN`, (3) builds
dn/dt and its Jacobian from its own coefficients and integrates them with
SciPy's Radau at a relative tolerance of 1e-10, and (4) integrates again with BDF,
to say how far two methods agree. Run it again whenever the network or a run
file changes; the header of each file keeps a mark of the texts it was made from.

    --binary PATH   a duskwater to compare with, instead of building one
    --no-binary     skip step 2
"""

import argparse
import csv
import io
import platform
import subprocess
import tomllib
from pathlib import Path

import numpy as np
import scipy
from scipy.integrate import solve_ivp

import laws

ROOT = Path(__file__).resolve().parents[2]
RUNS = ["dense-core", "diffuse", "post-shock"]
# n(X)/n_H below which values are not kept: the program's own tolerances end there.
FLOOR = 1e-16


def mark(texts):
    """Fowler-Noll-Vo 1a hash of texts, 64 bits."""
    value = 0xCBF29CE484222325
    for text in texts:
        for byte in text:
            value = (value ^ byte) * 0x100000001B3 % 2**64
    return f"{value:016x}"


def program_table(run, binary):
    command = [binary] if binary else ["cargo", "run", "--release", "--locked", "--quiet", "--"]
    command += ["rates", run, "--format", "csv"]
    out = subprocess.run(command, cwd=ROOT, check=True, capture_output=True, text=True).stdout
    lines = [line for line in out.splitlines() if not line.startswith("#")]
    return {row["reaction"]: row for row in csv.DictReader(io.StringIO("\n".join(lines)))}


def compare(run, reactions, own, binary):
    table = program_table(run, binary)
    missing = {r.identity for r in reactions} ^ set(table)
    if missing:
        raise SystemExit(f"{run}: reactions in one table only: {sorted(missing)}")
    worst = 0.0
    for reaction, (k, factors) in zip(reactions, own):
        row = table[reaction.identity]
        theirs = float(row["coefficient"])
        error = abs(k - theirs) / max(abs(k), 1e-300) if k != theirs else 0.0
        if not error <= 1e-9:
            raise SystemExit(f"{run}: {reaction.equation}: {k:e} here, {theirs:e} there")
        if sorted(row["depends_on"].split()) != sorted(factors):
            raise SystemExit(f"{run}: {reaction.equation} depends on {row['depends_on']}")
        worst = max(worst, error)
    print(f"{run}: {len(table)} coefficients agree to {worst:.1e}")
    return worst


class System:
    """dx/dt of abundances x = n/n_H, and its Jacobian."""

    def __init__(self, species, reactions, coefficients, n_h):
        index = {s.name: i for i, s in enumerate(species)}
        n, m = len(species), len(reactions)
        self.gain = np.zeros((n, m))
        self.k = np.zeros(m)
        # One constant "species" at the end fills up short lists of factors.
        self.factors = np.full((m, 3), n)
        for r, (reaction, (k, factors)) in enumerate(zip(reactions, coefficients)):
            for name in reaction.left:
                self.gain[index[name], r] -= 1
            for name in reaction.right:
                self.gain[index[name], r] += 1
            self.k[r] = k * n_h ** (len(factors) - 1)
            self.factors[r, : len(factors)] = [index[name] for name in factors]

    def rates(self, t, x):
        full = np.append(x, 1.0)
        return self.gain @ (self.k * full[self.factors].prod(axis=1))

    def jacobian(self, t, x):
        full = np.append(x, 1.0)
        values = full[self.factors]
        derivative = np.zeros((len(self.k), len(full)))
        rows = np.arange(len(self.k))
        for place in range(3):
            others = np.delete(values, place, axis=1).prod(axis=1)
            np.add.at(derivative, (rows, self.factors[:, place]), self.k * others)
        return self.gain @ derivative[:, :-1]


def start(species, given, c):
    x = np.array([given.get(s.name, 0.0) for s in species])
    names = [s.name for s in species]
    if "grain" in names and not ({"grain", "grain-"} & set(given)):
        volume = 4 / 3 * np.pi * (c["grain_radius"] * 1e-4) ** 3
        x[names.index("grain")] = 1.4 * laws.ATOMIC_MASS / c["gas_to_dust"] / (3.0 * volume)
    charge = np.array([s.charge for s in species])
    x[names.index("e-")] += charge @ x
    return x


def make(run, options):
    run_file = ROOT / "runs" / f"{run}.toml"
    text = tomllib.loads(run_file.read_text())
    folder = ROOT / "networks" / text["network"]
    species, reactions = laws.read_network(folder)
    by_name = {s.name: s for s in species}
    c = laws.conditions(text["cloud"])
    own = [laws.coefficient(reaction, by_name, c) for reaction in reactions]
    worst = None if options.no_binary else compare(run, reactions, own, options.binary)
    system = System(species, reactions, own, c["hydrogen_density"])
    x = start(species, text["start"], c)
    times = np.array([t for t in text["times"]["output"] if t > 0], dtype=float)

    def solve(method, rtol):
        done = solve_ivp(system.rates, (0, times[-1] * laws.YEAR), x, method=method, rtol=rtol,
                         atol=1e-24, t_eval=times * laws.YEAR, jac=system.jacobian)
        if not done.success:
            raise SystemExit(f"{run}: {method}: {done.message}")
        return done.y

    radau, bdf = solve("Radau", 1e-10), solve("BDF", 1e-9)
    large = radau > 1e-12
    agreement = np.max(np.abs(bdf[large] / radau[large] - 1))
    print(f"{run}: Radau at 1e-10 and BDF at 1e-9 agree to {agreement:.1e} above 1e-12")
    folders = [ROOT / "networks" / "cloud", folder]
    tables = [f / name for f in folders for name in ("species.csv", "reactions.csv")]
    sources = [path for path in dict.fromkeys(tables) if path.exists()] + [run_file]
    versions = f"Python {platform.python_version()}, NumPy {np.__version__}, SciPy {scipy.__version__}"
    said = "not compared" if worst is None else f"agree with `duskwater rates` to {worst:.0e}"
    header = [
        "# Reference abundances n(X)/n_H; made by tests/reference/make_reference.py.",
        f"# {versions}; solve_ivp, Radau, rtol 1e-10, atol 1e-24, analytic Jacobian.",
        f"# BDF at rtol 1e-9 agrees to {agreement:.1e} above 1e-12.",
        f"# {len(reactions)} coefficients evaluated apart from the program; they {said}.",
        f"# texts {mark(path.read_bytes() for path in sources)}",
        "species," + ",".join(f"{t:g}" for t in times),
    ]
    rows = [
        s.name + "," + ",".join(f"{value:.9e}" if value > FLOOR else "0" for value in values)
        for s, values in zip(species, radau)
    ]
    (ROOT / "tests" / "reference" / f"{run}.csv").write_text("\n".join(header + rows) + "\n")


if __name__ == "__main__":
    parser = argparse.ArgumentParser(description=__doc__.split("\n\n")[0])
    parser.add_argument("--binary")
    parser.add_argument("--no-binary", action="store_true")
    parser.add_argument("runs", nargs="*", default=RUNS)
    arguments = parser.parse_args()
    for name in arguments.runs:
        make(name, arguments)
