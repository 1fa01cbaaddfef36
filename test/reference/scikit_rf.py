"""Random channels of the specs in scikit-rf as Debian packs it (0.15.4), by its own media, connections and reader.

Reads a JSON list of channels on standard input, each with the folder of its Touchstone parts, and writes for each the S of its
grid as nested lists [point][row][column][re, im]. Lines are ideal media of scikit-rf, whose own mismatch steps join impedances;
branches are one-ports, hung in shunt or set in series; pairs come from mixed mode or from matrices of 2 x 2.
"""

import json
import os
import sys
import warnings

os.environ["OMP_NUM_THREADS"] = "1"
import numpy as np  # noqa: E402

warnings.filterwarnings("ignore")
# Names that this release of scikit-rf still uses and numpy 1.24 no longer has.
for name, kind in {"float": float, "complex": complex, "int": int, "bool": bool, "object": object}.items():
    if name not in np.__dict__:
        setattr(np, name, kind)

# scikit-rf prints that it has no plotting; standard output is for the answer alone.
answers, sys.stdout = sys.stdout, sys.stderr
import skrf  # noqa: E402
from skrf.media import DefinedGammaZ0  # noqa: E402

C0 = 299792458.0
EYE = np.eye(2)


class Bench:
    """One channel's frequencies, the reference of its joints, and the conductors of the channel."""

    def __init__(self, channel, folder):
        self.f = np.array(channel["grid"]["frequenciesHz"], dtype=float)
        self.w = 2 * np.pi * self.f
        self.frequency = skrf.Frequency.from_f(self.f, unit="hz")
        self.folder = folder
        self.pair = channel["signaling"] == "differential"
        self.z = references(channel)
        self.r = self.z[0]
        self.media = DefinedGammaZ0(self.frequency, gamma=1j * self.w / C0, z0=self.r, Z0=self.r)

    def network(self, s, z0=None):
        return skrf.Network(frequency=self.frequency, s=s, z0=self.r if z0 is None else z0)

    def line(self, part):
        ghz = self.f / 1e9
        db = part["lossSqrtDbPerM"] * np.sqrt(ghz) + part["lossLinearDbPerM"] * ghz
        gamma = db * np.log(10) / 20 + 1j * self.w * np.sqrt(part["effectivePermittivity"]) / C0
        medium = DefinedGammaZ0(self.frequency, gamma=gamma, z0=part["z0Ohm"], Z0=part["z0Ohm"])
        return medium, medium.line(part["lengthM"], "m")

    def reflection(self, branch):
        """Of R, L and C in series, at the joint."""
        z = branch.get("resistanceOhm", 0) + 1j * self.w * branch.get("inductanceH", 0)
        c = branch.get("capacitanceF")
        if c is None:
            return (z - self.r) / (z + self.r)
        y = 1j * self.w * c / (1 + 1j * self.w * c * z)
        return (1 - y * self.r) / (1 + y * self.r)

    def load(self, branch):
        return self.network(self.reflection(branch)[:, None, None])

    def series(self, branch):
        g = self.reflection(branch)
        return self.symmetric((1 + g) / (3 - g), 2 * (1 - g) / (3 - g))

    def shunt(self, branch):
        return self.media.shunt(self.load(branch))

    def symmetric(self, reflection, transmission, z0=None):
        s = np.array([[reflection, transmission], [transmission, reflection]])
        return self.network(s.transpose(2, 0, 1), z0)

    def legs(self, p, n):
        """Two two-ports beside each other: near p, near n, far p, far n."""
        s = np.zeros((len(self.f), 4, 4), dtype=complex)
        s[:, 0::2, 0::2] = p.s
        s[:, 1::2, 1::2] = n.s
        z0 = np.zeros((len(self.f), 4), dtype=complex)
        z0[:, 0::2] = p.z0
        z0[:, 1::2] = n.z0
        return self.network(s, z0)

    def modes(self, even, odd):
        """A symmetric pair from its two modes, each at the joint (Bockelman and Eisenstadt, 1995)."""
        s = np.zeros((len(self.f), 4, 4), dtype=complex)
        s[:, :2, :2] = odd.s
        s[:, 2:, 2:] = even.s
        m = np.array([[1, -1, 0, 0], [0, 0, 1, -1], [1, 1, 0, 0], [0, 0, 1, 1]]) / np.sqrt(2)
        return self.network(m.T @ s @ m)

    def at_joint(self, two_port):
        if np.all(two_port.z0 == self.r):
            return two_port
        thru = self.media.thru()
        return thru ** two_port ** thru

    def across(self, z):
        """A series block of 2 x 2 impedances in both conductors, by (z + 2 R)^-1."""
        inverse = np.linalg.inv(z + 2 * self.r * EYE)
        reflection = z @ inverse
        return self.block(reflection, 2 * self.r * inverse)

    def to_ground(self, y):
        """A shunt block of 2 x 2 admittances at both conductors."""
        inverse = np.linalg.inv(2 * EYE + self.r * y)
        return self.block(-self.r * y @ inverse, 2 * inverse)

    def block(self, reflection, transmission):
        s = np.zeros((len(self.f), 4, 4), dtype=complex)
        s[:, :2, :2] = s[:, 2:, 2:] = reflection
        s[:, :2, 2:] = s[:, 2:, :2] = transmission
        return self.network(s)


def references(channel):
    ports = 4 if channel["signaling"] == "differential" else 2
    z = channel["referenceOhm"]
    return np.array(z if isinstance(z, list) else [z] * ports, dtype=float)


def chain(parts):
    whole = parts[0]
    for part in parts[1:]:
        whole = whole**part
    return whole


def stub(b, e):
    medium, line = b.line(e)
    if e["end"] == "load":
        closed = line ** b.load(e["load"])
    else:
        closed = line ** (medium.open() if e["end"] == "open" else medium.short())
    # Seen from the joint's reference the stub is a load like any other.
    return b.media.shunt(b.media.thru() ** closed)


def rlgc(b, e):
    z = e["resistanceOhmPerM"] + 1j * b.w * e["inductanceHPerM"]
    y = e["conductanceSPerM"] + 1j * b.w * e["capacitanceFPerM"]
    length = e["lengthM"]
    gl = np.sqrt(z * y) * length
    small = np.abs(gl) < 1e-9
    # sinh(x)/x is 1 where the line has no length to speak of.
    ratio = np.where(small, 1, np.sinh(gl) / np.where(small, 1, gl))
    a = np.array([[np.cosh(gl), z * length * ratio], [y * length * ratio, np.cosh(gl)]]).transpose(2, 0, 1)
    return b.network(skrf.a2s(a, b.r * np.ones((len(b.f), 2), dtype=complex)))


def transformer(b, e):
    n = e["turnsRatio"]
    a = np.tile(np.array([[n, 0], [0, 1 / n]], dtype=complex), (len(b.f), 1, 1))
    return b.network(skrf.a2s(a, b.r * np.ones((len(b.f), 2), dtype=complex)))


def attenuator(b, e):
    passed = np.full(len(b.f), 10 ** (-e["attenuationDb"] / 20), dtype=complex)
    return b.symmetric(0 * passed, passed, e["z0Ohm"])


def capacitor(b, e):
    pad = {"capacitanceF": e["padCapacitanceF"]}
    body = {"resistanceOhm": e["seriesResistanceOhm"], "inductanceH": e["seriesInductanceH"]}
    return b.shunt(pad) ** b.series({**body, "capacitanceF": e["capacitanceF"]}) ** b.shunt(pad)


def placeholder(b, e):
    ratio = b.f / e["atHz"]
    passed = 10 ** (-e["lossDb"] * (np.sqrt(ratio) if e["shape"] == "sqrt" else ratio) / 20)
    asked = 10 ** (-e["returnLossDb"] / 20) if "returnLossDb" in e else 0
    reflected = np.minimum(asked, np.sqrt(np.maximum(0, 1 - passed**2)))
    turn = np.exp(-1j * b.w * e.get("delayS", 0))
    return b.symmetric(1j * reflected * turn, passed * turn)


def mode(e, name):
    return {
        "z0Ohm": e[name + "Z0Ohm"],
        "effectivePermittivity": e[name + "EffectivePermittivity"],
        "lengthM": e["lengthM"],
        "lossSqrtDbPerM": e[name + "Loss"]["sqrtDbPerM"],
        "lossLinearDbPerM": e[name + "Loss"]["linearDbPerM"],
    }


def pair_series(b, e):
    own, mutual = e["inductanceH"], e["mutualInductanceH"]
    z = np.array([[own, mutual], [mutual, own]])
    return b.across(1j * b.w[:, None, None] * z)


def pair_shunt(b, e):
    def admittance(c, ohm):
        return 1j * b.w * e[c] + (1 / e[ohm] if ohm in e else 0)

    ground = admittance("capacitanceF", "resistanceOhm")
    between = admittance("mutualCapacitanceF", "mutualResistanceOhm")
    y = np.array([[ground + between, -between], [-between, ground + between]])
    return b.to_ground(y.transpose(2, 0, 1))


NEAR_NEAR_FAR_FAR = {"1-3,2-4": [0, 1, 2, 3], "1-2,3-4": [0, 2, 1, 3], "1-4,2-3": [0, 1, 3, 2]}


def measured(b, e):
    part = skrf.Network(os.path.join(b.folder, e["file"]))
    order = NEAR_NEAR_FAR_FAR[e["portOrder"]] if part.nports == 4 else [0, 1]
    part = b.network(part.s[:, order][:, :, order], part.z0[:, order])
    if part.nports == 4:
        part.renormalize(b.r)
    return part.flipped() if e["reversed"] else part


TWO_PORTS = {
    "line": lambda b, e: b.line(e)[1],
    "rlgc-line": rlgc,
    "series": lambda b, e: b.series(e),
    "shunt": lambda b, e: b.shunt(e),
    "stub": stub,
    "tee": lambda b, e: b.series(e["near"]) ** b.shunt(e["shunt"]) ** b.series(e["far"]),
    "pi": lambda b, e: b.shunt(e["near"]) ** b.series(e["series"]) ** b.shunt(e["far"]),
    "transformer": transformer,
    "attenuator": attenuator,
    "capacitor": capacitor,
    "budget-loss": placeholder,
    "touchstone": measured,
}
PAIRS = {
    "coupled-line": lambda b, e: b.modes(
        b.at_joint(b.line(mode(e, "even"))[1]), b.at_joint(b.line(mode(e, "odd"))[1])
    ),
    "line-pair": lambda b, e: b.legs(b.at_joint(b.line(e["p"])[1]), b.at_joint(b.line(e["n"])[1])),
    "pair-series": pair_series,
    "pair-shunt": pair_shunt,
}


def build(b, e):
    if e["kind"] == "connector":
        return chain([build(b, part) for part in e["circuit"]])
    if e["kind"] in PAIRS:
        return PAIRS[e["kind"]](b, e)
    network = TWO_PORTS[e["kind"]](b, e)
    if not b.pair or network.nports == 4:
        return network
    leg = b.at_joint(network)
    return b.legs(leg, leg)


def solve(channel, folder):
    b = Bench(channel, folder)
    whole = chain([build(b, e) for e in channel["elements"]])
    half = len(b.z) // 2

    def thru(z):
        return b.symmetric(np.zeros(len(b.f), dtype=complex), np.ones(len(b.f), dtype=complex), z)

    # Steps of two-ports, one a conductor: this release mixes up the ports of a pair where two impedances of it differ.
    near, far = thru(b.z[0]) ** b.media.thru(), b.media.thru() ** thru(b.z[half])
    if b.pair:
        near, far = b.legs(near, near), b.legs(far, far)
    whole = near ** whole ** far
    return np.stack([whole.s.real, whole.s.imag], axis=-1).tolist()


def main():
    asked = json.load(sys.stdin)
    json.dump({"version": skrf.__version__, "s": [solve(one["channel"], one["folder"]) for one in asked]}, answers)


main()
