import {
  lineOfField,
  permittivity,
  roughnessExcess,
  solveSection,
  type Dielectric,
  type FieldSection,
  type Roughness,
} from '../index';
import type { LineMode } from '../line-constants';

const um = 1e-6;
const c0 = 299792458;
const laminate = (
  dk: number,
  df: number,
  dispersion: Dielectric['dispersion'] = 'wideband-debye',
): Dielectric => ({
  ...{ dk, df, atHz: 1e9, dispersion },
});
const strip: FieldSection = {
  sheets: [{ thicknessM: 317.5 * um, dk: 3.7 }],
  planeAbove: true,
  trace: { widthM: 125 * um, thicknessM: 17.5 * um },
  traceAtM: 150 * um,
};
const smooth = { conductivitySPerM: 5.8e7 };

/** alpha and beta of a mode at point k, 1/m. */
function propagation({ seriesOhmPerM: z, shuntSPerM: y }: LineMode, k: number): [number, number] {
  const re = z[2 * k]! * y[2 * k]! - z[2 * k + 1]! * y[2 * k + 1]!;
  const im = z[2 * k]! * y[2 * k + 1]! + z[2 * k + 1]! * y[2 * k]!;
  const size = Math.hypot(re, im);
  return [Math.abs(im) / Math.sqrt(2 * (size - re)), Math.sqrt((size - re) / 2)];
}

describe('a line from a field solution', () => {
  it('tends to the resistance of its copper at 0 Hz, trapezoid and all', () => {
    const section = { ...strip, trace: { ...strip.trace, etchAngleDeg: 60 } };
    const materials = { sheets: [laminate(3.7, 0.008)], conductor: smooth };
    const { modes } = lineOfField(solveSection(section), section, materials, Float64Array.of(0, 1));
    const meanM = 125 * um - (17.5 * um) / Math.tan(Math.PI / 3);
    expect(modes.single!.seriesOhmPerM[0]).toBeCloseTo(1 / (5.8e7 * meanM * 17.5 * um), 9);
    expect(modes.single!.seriesOhmPerM[1]).toBe(0);
  });

  it('follows its dielectric over frequency without being solved again', () => {
    const f = Float64Array.of(1e8, 1e9, 2e10);
    const materials = { sheets: [laminate(3.7, 0.02)], conductor: { conductivitySPerM: 1e15 } };
    const { single } = lineOfField(solveSection(strip), strip, materials, f).modes;
    const er = permittivity(materials.sheets[0]!, f);
    f.forEach((hz, k) => {
      const [alpha, beta] = propagation(single!, k);
      const exact = ((2 * Math.PI * hz) / c0) * Math.sqrt(er[2 * k]!);
      expect(beta / exact).toBeCloseTo(1, 3);
      expect(alpha / ((exact * er[2 * k + 1]!) / er[2 * k]! / 2)).toBeCloseTo(1, 2);
    });
  });

  it('by its filling agrees with a new solution at the permittivities of each frequency, far from where it was solved', () => {
    const section: FieldSection = {
      sheets: [{ thicknessM: 100 * um, dk: 4.2 }],
      planeAbove: false,
      trace: { widthM: 120 * um, thicknessM: 35 * um },
      traceAtM: 100 * um,
      gapM: 120 * um,
      mask: { thicknessM: 20 * um, dk: 3.4 },
    };
    const materials = { sheets: [laminate(4.2, 0.02)], mask: laminate(3.4, 0.028), conductor: smooth };
    const f = Float64Array.of(1e6, 5e10);
    const [sheet, mask] = [materials.sheets[0]!, materials.mask].map((material) => permittivity(material, f));
    const { modes } = lineOfField(solveSection(section), section, materials, f);
    f.forEach((_, k) => {
      const solved = solveSection({
        ...section,
        sheets: [{ thicknessM: 100 * um, dk: sheet![2 * k]! }],
        mask: { thicknessM: 20 * um, dk: mask![2 * k]! },
      });
      for (const name of ['even', 'odd'] as const) {
        const { effectivePermittivity: ee, filling } = solved.modes[name]!;
        const dielectricLoss = filling[0]! * sheet![2 * k + 1]! + filling[1]! * mask![2 * k + 1]!;
        const line = modes[name]!;
        // Capacitance over that of the air line, whose C is 1/(Zair c); conductance over susceptance. Dispersion leaves their ratio.
        const tangent = line.shuntSPerM[2 * k]! / line.shuntSPerM[2 * k + 1]!;
        expect(Math.abs(tangent / (dielectricLoss / ee) - 1)).toBeLessThan(0.01);
        if (k === 0) {
          const air = solved.modes[name]!.airOhm;
          const filledEe = (line.shuntSPerM[1]! / (2 * Math.PI * f[0]!)) * air * c0;
          expect(Math.abs(filledEe / ee - 1)).toBeLessThan(5e-4);
        }
      }
    });
  });

  /** Relative permittivity of ee at some frequencies of the measured board, 100 mm of loss (difference of two lines). */
  const measured: readonly [hz: number, ee: number, lossDb: number][] = [
    [0.5e9, 3.34512, 0.13545],
    [1e9, 3.32994, 0.26878],
    [2e9, 3.32346, 0.50957],
    [3e9, 3.33742, 0.76139],
    [4e9, 3.3588, 1.03346],
    [5e9, 3.38302, 1.2951],
  ];

  it('meets a measured FR-4 microstrip (w 3, h 1.55, t 0.05 mm; Dk 4.414, Df 0.0167 fitted once): ee to 0.02, loss to 0.1 dB', () => {
    const section: FieldSection = {
      sheets: [{ thicknessM: 1.55e-3, dk: 4.414 }],
      planeAbove: false,
      trace: { widthM: 3e-3, thicknessM: 50 * um },
      traceAtM: 1.55e-3,
    };
    const f = Float64Array.from(measured, ([hz]) => hz);
    const materials = { sheets: [laminate(4.414, 0.0167)], conductor: smooth };
    const { single } = lineOfField(solveSection(section), section, materials, f).modes;
    measured.forEach(([hz, ee, lossDb], k) => {
      const [alpha, beta] = propagation(single!, k);
      expect(Math.abs(((beta * c0) / (2 * Math.PI * hz)) ** 2 - ee)).toBeLessThan(0.02);
      expect(Math.abs(alpha * 0.1 * 20 * Math.LOG10E - lossDb)).toBeLessThan(0.1);
    });
  });

  it('says where the dispersion formula ends, and that a constant lossy dielectric is not causal', () => {
    const section: FieldSection = {
      sheets: [{ thicknessM: 1.55e-3, dk: 4.4 }],
      planeAbove: false,
      trace: { widthM: 3e-3, thicknessM: 50 * um },
      traceAtM: 1.55e-3,
    };
    const materials = { sheets: [laminate(4.4, 0.02, 'constant')], conductor: smooth };
    const { cautions } = lineOfField(solveSection(section), section, materials, Float64Array.of(1e9, 4e10));
    expect(cautions).toEqual([expect.stringContaining('not causal'), expect.stringContaining('2.51e+10 Hz')]);
  });
});

describe('a microstrip under more dielectric', () => {
  it('does not disperse, and says how much that may leave out where it is over a percent', () => {
    const buried: FieldSection = {
      sheets: [{ thicknessM: 1e-3, dk: 4.2 }],
      planeAbove: false,
      trace: { widthM: 1e-3, thicknessM: 35 * um },
      traceAtM: 0.8e-3,
    };
    const materials = { sheets: [laminate(4.2, 0, 'constant')], conductor: { conductivitySPerM: 1e15 } };
    const solution = solveSection(buried);
    const to = (...hz: number[]) => lineOfField(solution, buried, materials, Float64Array.from(hz));
    expect(to(1e8, 1e9).cautions).toEqual([]);
    const { modes, cautions } = to(1e8, 1e10);
    expect(cautions).toEqual([expect.stringMatching(/left out: up to \d\.\d %/)]);
    const [slow, fast] = [0, 1].map((k) => propagation(modes.single!, k)[1] / [1e8, 1e10][k]!);
    expect(fast! / slow!).toBeCloseTo(1, 4);
  });
});

describe('a dielectric of several points', () => {
  const f = Float64Array.of(1e9);
  const lossAndCautions = (furtherPoints: Dielectric['furtherPoints']) => {
    const materials = { sheets: [{ ...laminate(3.7, 0.01), furtherPoints }], conductor: smooth };
    const { modes, cautions } = lineOfField(solveSection(strip), strip, materials, f);
    return { loss: modes.single!.dielectricLossDbPerM[0]!, cautions };
  };
  it('loses as its model fitted to all of them says', () => {
    const [one, two] = [undefined, [{ dk: 3.66, df: 0.012, atHz: 1e10 }]].map(lossAndCautions);
    expect(two!.loss / one!.loss).toBeGreaterThan(1.04);
    expect(two!.loss / one!.loss).toBeLessThan(1.14);
  });
  it('says so where the model misses them, and nothing where it meets them', () => {
    expect(lossAndCautions([{ dk: 3.62, df: 0.02, atHz: 1e10 }]).cautions).toEqual([
      expect.stringMatching(/misses them by up to \d\.\d % in Dk, \d\d\.\d % in Df/),
    ]);
    expect(lossAndCautions([{ dk: 3.645, df: 0.0102, atHz: 1e10 }]).cautions).toEqual([]);
  });
});

describe('a causal line', () => {
  const faces: [string, Roughness][] = [
    ['smooth copper', { model: 'none' }],
    ['a cannonball foil', { model: 'cannonball', rzM: 6 * um }],
    ['a Hammerstad foil', { model: 'hammerstad', rqM: 1 * um }],
    ['a Groiss foil', { model: 'groiss', rqM: 1 * um }],
  ];

  /**
   * The phase that the attenuation alone asks for, by Kramers and Kronig with one subtraction: beta(w)/w - beta(v)/v, where v is the
   * highest frequency looked at.
   */
  function slownessFromLoss(alphaAt: (hz: number) => number, hz: number): number {
    // (2/pi) PV of the integral of alpha(u)/(u^2 - w^2) du, over t = ln(u/w), both sides together.
    let sum = 0;
    const step = 0.02;
    for (let t = step / 2; t < 14; t += step) {
      sum += ((alphaAt(hz * Math.exp(t)) - alphaAt(hz * Math.exp(-t))) / Math.sinh(t)) * step;
    }
    return sum / (Math.PI * 2 * Math.PI * hz);
  }

  it.each(faces)('of %s has the phase that its attenuation asks for', (_, foil) => {
    const materials = {
      sheets: [laminate(3.7, 0.01)],
      conductor: { ...smooth, roughness: { foot: foil, top: foil } },
    };
    const solution = solveSection(strip);
    const at = (hz: number) =>
      propagation(lineOfField(solution, strip, materials, Float64Array.of(hz)).modes.single!, 0);
    const alphaAt = (hz: number) => at(hz)[0];
    const slowness = (hz: number) => at(hz)[1] / (2 * Math.PI * hz);
    const asked = [1e9, 3e9, 1e10, 3e10].map((hz) => slownessFromLoss(alphaAt, hz));
    const found = [1e9, 3e9, 1e10, 3e10].map(slowness);
    for (let k = 1; k < found.length; k++) {
      const [modelled, demanded] = [found[0]! - found[k]!, asked[0]! - asked[k]!];
      // Differences of slowness, against a slowness of 6.4 ns/m: what dispersion there is, to a twentieth.
      expect(Math.abs(modelled - demanded)).toBeLessThan(0.05 * modelled);
    }
  });

  /** Step response of 100 mm at each time, of a step as steep as a band to 100 GHz with a soft end lets it be. */
  function stepResponse(dispersion: Dielectric['dispersion'], timesS: readonly number[]): number[] {
    const stepHz = 1e8;
    const topHz = 1e11;
    const f = Float64Array.from({ length: topHz / stepHz }, (_, k) => (k + 0.5) * stepHz);
    const materials = { sheets: [laminate(3.7, 0.02, dispersion)], conductor: smooth };
    const line = lineOfField(solveSection(strip), strip, materials, f).modes.single!;
    const through = [...f].map((hz, k) => {
      const [alpha, beta] = propagation(line, k);
      const soft = Math.exp(-((hz / topHz) ** 2) * 6);
      return [0.1 * beta, Math.exp(-0.1 * alpha) * soft] as const;
    });
    // Odd multiples of half a step: a square wave whose edges stand 10 ns apart.
    return timesS.map((t) =>
      through.reduce((sum, [phase, size], k) => {
        return sum + (stepHz * size * Math.sin(2 * Math.PI * f[k]! * t - phase)) / (Math.PI * f[k]!);
      }, 0.5),
    );
  }

  it('shows nothing of a step before the delay of its fastest waves', () => {
    const [atInfinity] = permittivity(laminate(3.7, 0.02), Float64Array.of(1e14));
    const delayS = (0.1 * Math.sqrt(atInfinity!)) / c0;
    const times = [0.4, 0.6, 0.8, 0.9, 0.95].map((share) => share * delayS);
    const [base, ...early] = stepResponse('wideband-debye', times);
    early.forEach((value) => expect(Math.abs(value - base!)).toBeLessThan(1e-4));
    // A constant permittivity with loss is already on its way by then.
    const [resting, , , , ahead] = stepResponse('constant', times);
    expect(ahead! - resting!).toBeGreaterThan(0.02);
    const [risen] = stepResponse('wideband-debye', [1.2 * delayS]);
    expect(risen).toBeGreaterThan(0.9);
  });

  it('of rough copper would not be so, were reactance and resistance raised alike', () => {
    const foil: Roughness = { model: 'cannonball', rzM: 6 * um };
    const [resistance, reactance] = roughnessExcess(foil, 0.66 * um);
    expect(reactance / resistance).toBeGreaterThan(2);
  });
});
