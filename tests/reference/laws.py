"""Rate laws, written again from the papers, apart from the program.

Shares no code with the program: only the tables of the network and the run
file are read by both. Units: cm, s, K, u, esu.
"""

import csv
import math
import re
import tomllib
from dataclasses import dataclass, field
from pathlib import Path

# CODATA 2018; the calorie of nothing here is thermochemical.
BOLTZMANN = 1.380649e-16
CHARGE = 1.602176634e-19 * 2.99792458e9
ATOMIC_MASS = 1.66053906660e-24
ELECTRON_MASS = 5.48579909065e-4
YEAR = 3.15576e7

# IUPAC 2021 abridged standard atomic weights, of the elements that occur.
WEIGHT = {
    "H": 1.0080, "He": 4.0026, "C": 12.011, "N": 14.007, "O": 15.999, "F": 18.998,
    "Na": 22.990, "Mg": 24.305, "Si": 28.085, "P": 30.974, "S": 32.06, "Cl": 35.45,
    "Fe": 55.845,
}

# Weingartner & Draine 2001, ApJ 563, 842, table 3 (provenance: memory).
EFFECTIVE = {
    "H+": (12.25, 8.074e-6, 1.378, 5.087e2, 1.586e-2, 0.4723, 1.102e-5),
    "He+": (5.572, 3.185e-7, 1.512, 5.115e3, 3.903e-7, 0.4956, 5.494e-7),
    "C+": (45.58, 6.089e-3, 1.128, 4.331e2, 4.845e-2, 0.8120, 1.333e-4),
    "Na+": (2.178, 1.732e-7, 2.133, 1.029e4, 1.859e-6, 1.0341, 3.223e-5),
    "Mg+": (2.510, 8.116e-8, 1.864, 6.170e4, 2.169e-6, 0.9605, 7.232e-5),
    "Si+": (2.166, 5.678e-8, 1.874, 4.375e4, 1.635e-6, 0.8964, 7.538e-5),
    "S+": (3.064, 7.769e-5, 1.319, 1.087e2, 3.475e-1, 0.4790, 4.689e-2),
    "Fe+": (1.701, 9.554e-8, 1.851, 5.763e4, 4.116e-8, 0.9456, 2.198e-5),
}

# Visser, van Dishoeck & Black 2009, A&A 503, 323, table 5 (provenance: memory):
# rows no H2, 1e19 ... 1e23; columns no CO, 1e13 ... 1e19 cm-2.
CO_SHIELDING = [
    [1.0, 9.681e-1, 7.764e-1, 3.631e-1, 7.013e-2, 1.295e-2, 1.738e-3, 9.985e-5],
    [8.215e-1, 7.916e-1, 6.160e-1, 2.749e-1, 5.351e-2, 1.065e-2, 1.519e-3, 8.818e-5],
    [7.160e-1, 6.900e-1, 5.360e-1, 2.359e-1, 4.416e-2, 8.769e-3, 1.254e-3, 7.558e-5],
    [3.500e-1, 3.415e-1, 2.863e-1, 1.360e-1, 2.500e-2, 4.983e-3, 7.151e-4, 3.796e-5],
    [4.973e-2, 4.877e-2, 4.296e-2, 2.110e-2, 4.958e-3, 9.245e-4, 1.745e-4, 8.377e-6],
    [1.310e-4, 1.293e-4, 1.160e-4, 6.346e-5, 1.822e-5, 6.842e-6, 3.622e-6, 3.572e-7],
]
# The program's own rounded values for N2 (docs of the shielding functions).
N2_SELF = [1.0, 0.93, 0.60, 0.18, 4.0e-2, 1.0e-2, 2.5e-3, 5.0e-4]
N2_BY_H2 = [1.0, 0.90, 0.75, 0.40, 5.0e-2, 1.0e-4]
SELF_AXIS = [13, 14, 15, 16, 17, 18, 19]
H2_AXIS = [19, 20, 21, 22, 23]


@dataclass
class Species:
    name: str
    atoms: dict = field(default_factory=dict)
    charge: int = 0
    polarizability: float = 0.0
    dipole: float = 0.0

    @property
    def mass(self):
        heavy = sum(WEIGHT[element] * count for element, count in self.atoms.items())
        return heavy - self.charge * ELECTRON_MASS

    @property
    def grain(self):
        return "grain" in self.atoms


@dataclass
class Reaction:
    identity: str
    equation: str
    left: list
    right: list
    rows: list

    @property
    def law(self):
        return self.rows[0]["law"]


def species_of(row):
    name = row["species"].strip()
    body = name.rstrip("+-")
    charge = name.count("+") - name.count("-")
    text = row.get("composition") or ""
    if text.strip():
        pairs = (part.split(":") for part in text.split())
        atoms = {element: int(count) for element, count in pairs}
    elif body == "e":
        atoms = {}
    elif body == "grain":
        atoms = {"grain": 1}
    else:
        atoms = {}
        for element, count in re.findall(r"([A-Z][a-z]?)(\d*)", body):
            atoms[element] = atoms.get(element, 0) + int(count or 1)
    number = lambda key: float(row.get(key) or 0.0)
    return Species(name, atoms, charge, number("polarizability_A3"), number("dipole_D"))


def side(text):
    names = []
    for term in re.split(r"\s\+\s", text.strip()):
        count, _, name = term.strip().rpartition(" ")
        names += [name.strip()] * int(count or 1)
    return names


def rows_of(path):
    if not path.exists():
        return []
    with open(path, newline="") as file:
        return list(csv.DictReader(file))


def read_network(folder):
    """Species and reactions of a network folder, or of a variant of the one beside it."""
    folder = Path(folder)
    head = tomllib.loads((folder / "network.toml").read_text())
    species, reactions = [], {}
    if "base" in head:
        species, base = read_network(folder.parent / head["base"])
        keep = set(head.get("species", [s.name for s in species]))
        species = [s for s in species if s.name in keep]
        for reaction in base:
            names = set(reaction.left) | set(reaction.right)
            if names <= keep and reaction.identity not in head.get("without", []):
                reactions[reaction.identity] = reaction
    species += [species_of(row) for row in rows_of(folder / "species.csv")]
    for row in rows_of(folder / "reactions.csv"):
        left, right = (side(part) for part in row["equation"].split("->"))
        axis = "collision" if row["law"] in ("thermal", "capture") else row["law"]
        key = (tuple(sorted(left)), tuple(sorted(right)), axis)
        numbers = {k: float(row[k] or 0) for k in ("alpha", "beta", "gamma", "t_min", "t_max")}
        numbers["law"] = row["law"]
        numbers["id"] = row["id"]
        if key in reactions:
            reactions[key].rows.append(numbers)
        else:
            reactions[key] = Reaction(row["id"], row["equation"], left, right, [numbers])
    for reaction in reactions.values():
        reaction.rows.sort(key=lambda row: row["t_min"])
        reaction.identity = reaction.rows[0]["id"]
    return species, list(reactions.values())


def conditions(cloud):
    c = {
        "dust_temperature": cloud["temperature"], "radiation_field": 1.0, "dust_albedo": 0.5,
        "gas_to_dust": 100.0, "doppler_width": 1.0, "grain_radius": 0.1,
        "reference_electron_abundance": 1e-7,
    }
    # Bohlin, Savage & Drake 1978, ApJ 224, 132; the shares are the program's.
    hydrogen = 1.87e21 * cloud["visual_extinction"]
    c |= {"h2_column": 0.25 * hydrogen, "co_column": 1e-6 * hydrogen, "n2_column": 1e-6 * hydrogen}
    return c | cloud


def place(axis, column):
    """Left node (0 is no column) and share of the right one."""
    if column <= 0:
        return 0, 0.0
    log = math.log10(column)
    if log <= axis[0]:
        return 0, column / 10.0 ** axis[0]
    if log >= axis[-1]:
        return len(axis) - 1, 1.0
    node = max(i for i, edge in enumerate(axis) if edge <= log)
    return node + 1, log - axis[node]


def between(table, at, share):
    return math.log(table[at]) * (1 - share) + math.log(table[at + 1]) * share


def shielding(atoms, c):
    if atoms == {"H": 2}:
        # Draine & Bertoldi 1996, ApJ 468, 269, eq. 37.
        x = c["h2_column"] / 5e14
        if x <= 0:
            return 1.0
        root = math.sqrt(1 + x)
        lines = 0.965 / (1 + x / c["doppler_width"]) ** 2
        return min(1.0, lines + 0.035 / root * math.exp(-8.5e-4 * root))
    if atoms == {"C": 1, "O": 1}:
        row, down = place(H2_AXIS, c["h2_column"])
        at, share = place(SELF_AXIS, c["co_column"])
        upper, lower = (between(CO_SHIELDING[r], at, share) for r in (row, row + 1))
        return math.exp(upper * (1 - down) + lower * down)
    if atoms == {"N": 2}:
        own = between(N2_SELF, *place(SELF_AXIS, c["n2_column"]))
        return math.exp(own + between(N2_BY_H2, *place(H2_AXIS, c["h2_column"])))
    return 1.0


def capture(a, b, temperature):
    """Langevin 1905; Su & Chesnavich 1982, J. Chem. Phys. 76, 5183."""
    ion, neutral = (a, b) if a.charge else (b, a)
    volume = neutral.polarizability * 1e-24
    mass = ion.mass * neutral.mass / (ion.mass + neutral.mass) * ATOMIC_MASS
    langevin = 2 * math.pi * abs(ion.charge) * CHARGE * math.sqrt(volume / mass)
    if neutral.dipole <= 0:
        return langevin
    x = neutral.dipole * 1e-18 / math.sqrt(2 * volume * BOLTZMANN * temperature)
    if x >= 2:
        return langevin * (0.4767 * x + 0.6200)
    return langevin * ((x + 0.5090) ** 2 / 10.526 + 0.9754)


def grain_collision(grain, other, c, temperature):
    """Draine & Sutin 1987, ApJ 320, 803, eqs. 3.3 to 3.5."""
    mass = (other.mass if other.atoms else ELECTRON_MASS) * ATOMIC_MASS
    radius = c["grain_radius"] * 1e-4
    speed = math.sqrt(8 * BOLTZMANN * temperature / (math.pi * mass))
    k = math.pi * radius**2 * speed
    if other.charge == 0:
        return k
    tau = radius * BOLTZMANN * temperature / (other.charge * CHARGE) ** 2
    nu = grain.charge / other.charge
    if nu == 0:
        return k * (1 + math.sqrt(math.pi / (2 * tau)))
    if nu < 0:
        return k * (1 - nu / tau) * (1 + math.sqrt(2 / (tau - 2 * nu)))
    theta = nu / (1 + nu**-0.5)
    return k * (1 + (4 * tau + 3 * nu) ** -0.5) ** 2 * math.exp(-theta / tau)


def effective_recombination(name, c, temperature):
    c0, c1, c2, c3, c4, c5, c6 = EFFECTIVE[name]
    field = 1.7 * c["radiation_field"] * math.exp(-1.8 * c["visual_extinction"])
    electrons = c["reference_electron_abundance"] * c["hydrogen_density"]
    psi = min(max(field * math.sqrt(temperature) / electrons, 1e2), 1e6)
    t = min(max(temperature, 10.0), 1000.0)
    inner = 1 + c3 * t**c4 * psi ** (-c5 - c6 * math.log(t))
    return 1e-14 * c0 / (1 + c1 * psi**c2 * inner)


def row_at(rows, temperature):
    """The row that holds, and the temperature at which it is taken."""
    for row in reversed(rows):
        if row["t_min"] <= temperature <= row["t_max"]:
            return row, temperature
    # Outside all rows the nearest edge holds, the lower row where two are as near.
    edges = [(abs(temperature - row[key]), i, row[key]) for i, row in enumerate(rows)
             for key in ("t_min", "t_max")]
    distance = min(edge[0] for edge in edges)
    _, i, edge = next(e for e in edges if e[0] == distance)
    return rows[i], edge


def coefficient(reaction, by_name, c):
    """The coefficient, and the species whose densities multiply it."""
    row, temperature = row_at(reaction.rows, c["temperature"])
    alpha, beta, gamma = row["alpha"], row["beta"], row["gamma"]
    zeta, n_h = c["cosmic_ray_ionization_rate"], c["hydrogen_density"]
    dust = 100.0 / c["gas_to_dust"]
    left = [by_name[name] for name in reaction.left]
    match row["law"]:
        case "thermal":
            k = alpha * (temperature / 300) ** beta * math.exp(-gamma / temperature)
        case "capture":
            k = alpha * capture(*left, temperature)
        case "cosmic_ray":
            k = alpha * zeta
        case "cosmic_ray_photon":
            k = alpha * zeta / (1 - c["dust_albedo"])
        case "starlight":
            dimmed = math.exp(-gamma * c["visual_extinction"])
            k = alpha * c["radiation_field"] * dimmed
            if left[0].charge == 0:
                k *= shielding(left[0].atoms, c)
        case "dust_h2":
            # Jura 1975, ApJ 197, 575; Hollenbach & McKee 1979, ApJS 41, 555, eq. 3.7.
            t, both = temperature / 100, (temperature + c["dust_temperature"]) / 100
            sticking = 1 / (1 + 0.4 * math.sqrt(both) + 0.2 * t + 0.08 * t * t)
            k = alpha * t**beta * sticking * n_h * dust
            return k, reaction.left[:1]
        case "dust_recombination" if any(s.grain for s in left):
            grain, other = left if left[0].grain else reversed(left)
            k = alpha * grain_collision(grain, other, c, temperature)
        case "dust_recombination":
            ion = next(s for s in left if s.atoms)
            k = alpha * effective_recombination(ion.name, c, temperature) * n_h * dust
            return k, [ion.name]
        case law:
            raise SystemExit(f"law {law} is not written here")
    return k, reaction.left
