"""The jobs of the bench in scikit-rf as Debian packs it. Prints one line "job seconds" each, the median of several runs.

Arguments: the Touchstone file of the reading job, and a folder for the writing job.
"""

import os
import statistics
import sys
import time
import warnings

import numpy as np

warnings.filterwarnings("ignore")
# Names that this release of scikit-rf still uses and numpy 1.24 no longer has.
for name, kind in {"float": float, "complex": complex, "int": int, "bool": bool, "object": object}.items():
    if name not in np.__dict__:
        setattr(np, name, kind)

import skrf  # noqa: E402


def measure(job, work, runs):
    times = []
    for _ in range(runs):
        started = time.perf_counter()
        work()
        times.append(time.perf_counter() - started)
    print(job, statistics.median(times))


def sections(ports, count=20, points=2001):
    random = np.random.default_rng(1)
    frequency = skrf.Frequency(0.01, 20, points, "ghz")
    shape = (points, ports, ports)

    def one():
        s = (random.random(shape) - 0.5) * 0.6 + 1j * (random.random(shape) - 0.5) * 0.6
        return skrf.Network(frequency=frequency, s=s, z0=50)

    return [one() for _ in range(count)]


def chain(parts):
    whole = parts[0]
    for part in parts[1:]:
        whole = whole**part
    return whole


def trials(count):
    """A few of the thousand channels, built from media and cascaded; the whole is `count` times as long."""
    random = np.random.default_rng(2)
    frequency = skrf.Frequency(0.04, 20, 500, "ghz")
    air = skrf.media.DefinedGammaZ0(frequency, z0=50, gamma=1j * frequency.w / 299792458.0)
    gigahertz = frequency.f / 1e9

    def element(k):
        if k % 4 == 1:
            return air.resistor(random.random()) ** air.inductor(random.random() * 1e-10)
        if k % 4 == 3:
            return air.shunt_capacitor(random.random() * 1e-13)
        loss = 5 * random.random() * np.sqrt(gigahertz) + 5 * random.random() * gigahertz
        gamma = loss / 8.685889638 + 1j * frequency.w * np.sqrt(3 + random.random()) / 299792458.0
        z0 = 40 + 20 * random.random()
        line = skrf.media.DefinedGammaZ0(frequency, z0=z0, gamma=gamma).line(0.02 * random.random(), "m")
        line.renormalize(50)
        return line

    for _ in range(count):
        chain([element(k) for k in range(20)])


def main():
    path, folder = sys.argv[1:3]
    two, four = sections(2), sections(4)
    measure("cascade-2-ports-20x2001", lambda: chain(two), 7)
    measure("cascade-4-ports-20x2001", lambda: chain(four), 7)
    started = time.perf_counter()
    trials(5)
    print("trials", (time.perf_counter() - started) * 200)
    measure("read-4x10000", lambda: skrf.Network(path), 3)
    network = skrf.Network(path)
    measure("write-4x10000", lambda: network.write_touchstone("scikit", dir=folder), 3)
    os.remove(os.path.join(folder, "scikit.s4p"))


main()
