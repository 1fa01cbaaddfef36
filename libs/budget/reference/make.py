"""Expected values for the specs of libs/budget, from closed forms, independent of the engine.

Chains are multiplied as ABCD matrices with numpy (Pozar, Microwave Engineering, chapter 4) and turned into power-wave S
(Frickey, IEEE Trans. MTT-42, 1994, for complex references). Pairs: even and odd mode of a symmetric pair. Run from any
folder: python3 make.py
"""

import json
import os

import numpy as np

C0 = 299792458.0
NEPER = 20 / np.log(10)
HERE = os.path.dirname(os.path.abspath(__file__))


def gamma(f, eps, sqrt_loss=0.0, linear_loss=0.0):
    alpha = (sqrt_loss * np.sqrt(f / 1e9) + linear_loss * f / 1e9) / NEPER
    return alpha + 2j * np.pi * f * np.sqrt(eps) / C0


def line(f, z0, length, eps, sqrt_loss=0.0, linear_loss=0.0):
    gl = gamma(f, eps, sqrt_loss, linear_loss) * length
    return np.array([[np.cosh(gl), z0 * np.sinh(gl)], [np.sinh(gl) / z0, np.cosh(gl)]])


def shunt(y):
    return np.array([[1, 0], [y, 1]], dtype=complex)


def series(z):
    return np.array([[1, z], [0, 1]], dtype=complex)


def s_of(m, z1, z2):
    (a, b), (c, d) = m
    r = 2 * np.sqrt(np.real(z1) * np.real(z2))
    den = a * z2 + b + c * z1 * z2 + d * z1
    return np.array(
        [
            [(a * z2 + b - c * np.conj(z1) * z2 - d * np.conj(z1)) / den, r * (a * d - b * c) / den],
            [r / den, (-a * np.conj(z2) + b - c * z1 * np.conj(z2) + d * z1) / den],
        ]
    )


def s4_of(m, z):
    """S of [V1; I1] = m [V2; I2] for two near and two far ports of one real reference."""
    q = np.sqrt(z)
    eye = np.eye(2)
    a, b, c, d = m[:2, :2], m[:2, 2:], m[2:, :2], m[2:, 2:]
    # V1 = q (a1 + b1), I1 = (a1 - b1)/q; V2 = q (a2 + b2), I2 = (b2 - a2)/q
    left = np.block([[q * eye, -(q * a + b / q)], [-eye / q, -(q * c + d / q)]])
    right = np.block([[-q * eye, q * a - b / q], [-eye / q, q * c - d / q]])
    return np.linalg.solve(left, right)


def pair(p, n):
    m = np.zeros((4, 4), dtype=complex)
    for row in range(2):
        for column in range(2):
            m[2 * row : 2 * row + 2, 2 * column : 2 * column + 2] = np.diag([p[row, column], n[row, column]])
    return m


def coupled(even, odd):
    u = np.array([[1, 1], [1, -1]]) / np.sqrt(2)
    m = pair(even, odd)
    for row in range(2):
        for column in range(2):
            part = np.s_[2 * row : 2 * row + 2, 2 * column : 2 * column + 2]
            m[part] = u @ m[part] @ u.T
    return m


def mixed(s):
    m = np.array([[1, -1, 0, 0], [0, 0, 1, -1], [1, 1, 0, 0], [0, 0, 1, 1]]) / np.sqrt(2)
    return m @ s @ m.T


def pairs_of(matrix):
    return [[[float(np.real(x)), float(np.imag(x))] for x in row] for row in matrix]


def write(name, channel, expected, tolerance):
    text = json.dumps({"channel": channel, "expected": expected, **tolerance})
    with open(os.path.join(HERE, name + ".json"), "w", encoding="utf-8") as out:
        out.write(text + "\n")


def channel_of(name, frequencies, elements, **more):
    return {
        "format": "tollgate.channel/1",
        "name": name,
        "signaling": "single-ended",
        "grid": {"frequenciesHz": [float(f) for f in frequencies]},
        "elements": elements,
        **more,
    }


def line_fields(z0, length, eps, sqrt_loss, linear_loss):
    return {
        "z0Ohm": z0,
        "lengthM": length,
        "effectivePermittivity": eps,
        "lossSqrtDbPerM": sqrt_loss,
        "lossLinearDbPerM": linear_loss,
    }


def mismatch_line():
    f = np.array([1e7, 3.3e8, 1e9, 2.71e9, 7.1e9, 1.4e10, 2.2e10])
    fields = (61.0, 0.083, 3.61, 3.4, 5.2)
    s = [pairs_of(s_of(line(x, *fields), 50, 50)) for x in f]
    tolls = [[float(x), float((3.4 * np.sqrt(x / 1e9) + 5.2 * x / 1e9) * 0.083)] for x in f]
    channel = channel_of("Line of 61 ohm in 50", f, [{"kind": "line", **line_fields(*fields)}])
    write("mismatch-line", channel, {"s": s, "tollDb": tolls}, {"toleranceAbs": 1e-11})


def stub():
    f = np.array([1e8, 2.5e9, 9.9e9, 1.2491e10, 1.6e10, 2.4e10])
    elements = [
        {"kind": "line", **line_fields(48.0, 0.021, 3.9, 4.0, 6.0)},
        {"kind": "stub", "end": "open", **line_fields(55.0, 0.003, 4.0, 1.0, 2.0)},
        {"kind": "series", "inductanceH": 1.3e-10, "resistanceOhm": 0.2},
        {"kind": "line", **line_fields(52.0, 0.034, 3.9, 4.0, 6.0)},
    ]
    s = []
    for x in f:
        y = np.tanh(gamma(x, 4.0, 1.0, 2.0) * 0.003) / 55.0
        m = line(x, 48.0, 0.021, 3.9, 4.0, 6.0) @ shunt(y) @ series(0.2 + 2j * np.pi * x * 1.3e-10)
        s.append(pairs_of(s_of(m @ line(x, 52.0, 0.034, 3.9, 4.0, 6.0), 50, 50)))
    write("open-stub", channel_of("Stub in a line", f, elements), {"s": s}, {"toleranceAbs": 1e-11})


def complex_reference():
    f = np.array([5e7, 1.1e9, 4.7e9, 1.9e10])
    z1, z2 = 43 + 6j, 57 - 11j
    elements = [
        {"kind": "line", **line_fields(46.0, 0.052, 3.3, 2.0, 3.0)},
        {"kind": "shunt", "capacitanceF": 1.1e-13},
    ]
    s = [
        pairs_of(s_of(line(x, 46.0, 0.052, 3.3, 2.0, 3.0) @ shunt(2j * np.pi * x * 1.1e-13), z1, z2)) for x in f
    ]
    channel = channel_of("Complex references", f, elements, referenceOhm=[[43, 6], [57, -11]])
    write("complex-reference", channel, {"s": s}, {"toleranceAbs": 1e-11})


def coupled_pair():
    f = np.array([1e7, 8e8, 3.1e9, 9.3e9, 1.7e10])
    elements = [
        {
            "kind": "coupled-line",
            "evenZ0Ohm": 57.0,
            "oddZ0Ohm": 44.0,
            "evenEffectivePermittivity": 3.9,
            "oddEffectivePermittivity": 3.5,
            "lengthM": 0.061,
            "evenLoss": {"sqrtDbPerM": 2.0, "linearDbPerM": 4.0},
            "oddLoss": {"sqrtDbPerM": 3.0, "linearDbPerM": 4.5},
        },
        {
            "kind": "line-pair",
            "p": line_fields(49.0, 0.020, 3.7, 3.0, 5.0),
            "n": line_fields(49.0, 0.0214, 3.7, 3.0, 5.0),
        },
        {"kind": "shunt", "capacitanceF": 7e-14},
    ]
    s, mm = [], []
    for x in f:
        m = coupled(line(x, 57.0, 0.061, 3.9, 2.0, 4.0), line(x, 44.0, 0.061, 3.5, 3.0, 4.5))
        m = m @ pair(line(x, 49.0, 0.020, 3.7, 3.0, 5.0), line(x, 49.0, 0.0214, 3.7, 3.0, 5.0))
        y = shunt(2j * np.pi * x * 7e-14)
        four = s4_of(m @ pair(y, y), 50.0)
        s.append(pairs_of(four))
        mm.append(pairs_of(mixed(four)))
    channel = channel_of("Coupled pair with skew", f, elements)
    channel["signaling"] = "differential"
    write("coupled-pair", channel, {"s": s, "mixedMode": mm}, {"toleranceAbs": 1e-11})


def mask_step():
    f = np.linspace(5e7, 8e9, 160)
    elements = [
        {"kind": "line", **line_fields(58.0, 0.011, 3.8, 3.0, 5.0)},
        {"kind": "shunt", "capacitanceF": 1.6e-13},
        {"kind": "line", **line_fields(44.0, 0.017, 3.8, 3.0, 5.0)},
    ]
    points = [(1e8, 18.0), (2e9, 14.5), (2e9, 9.0), (7e9, 4.0)]
    ranges = [(points[0], points[1]), (points[2], points[3])]
    margins = []
    for x in f:
        m = line(x, 58.0, 0.011, 3.8, 3.0, 5.0) @ shunt(2j * np.pi * x * 1.6e-13)
        m = m @ line(x, 44.0, 0.017, 3.8, 3.0, 5.0)
        loss = -20 * np.log10(abs(s_of(m, 50, 50)[0, 0]))
        bounds = [
            a[1] + (b[1] - a[1]) * (x - a[0]) / (b[0] - a[0]) for a, b in ranges if a[0] <= x <= b[0]
        ]
        margins.append(loss - max(bounds) if bounds else np.nan)
    worst = int(np.nanargmin(margins))
    below = [i for i, m in enumerate(margins) if m < 0]
    exceeds = []
    for i in below:
        if exceeds and exceeds[-1][1] == f[i - 1]:
            exceeds[-1][1] = float(f[i])
        else:
            exceeds.append([float(f[i]), float(f[i])])
    limit = {
        "id": "rl",
        "title": "Return loss with a step",
        "quantity": "return-loss-near",
        "sense": "min",
        "points": [list(p) for p in points],
        "interpolation": "linear",
    }
    expected = {
        "limits": [
            {
                "id": "rl",
                "holds": bool(margins[worst] >= 0),
                "worst": {"frequencyHz": float(f[worst]), "marginDb": float(margins[worst])},
                "exceedsHz": exceeds,
            }
        ]
    }
    write("mask-step", channel_of("Mask with a step", f, elements, limits=[limit]), expected, {"toleranceDb": 1e-9})


for make in (mismatch_line, stub, complex_reference, coupled_pair, mask_step):
    make()
