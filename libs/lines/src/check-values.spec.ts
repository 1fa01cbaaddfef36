import {
  airMicrostrip,
  cohnPair,
  disperseMicrostrip,
  exactStripline,
  kirschningPair,
  microstripPermittivity,
  permittivity,
  roughnessFactor,
  skinDepth,
  surfaceResistance,
  thickAirMicrostrip,
  thickMicrostripPermittivity,
  thickPair,
  wheelerStripline,
} from './index';

/** Worked values print so many digits; half a unit of the last one is allowed. */
const agrees = (value: number, printed: string): void => {
  const digits = printed.split('.')[1]?.length ?? 0;
  expect(Math.abs(value - Number(printed))).toBeLessThanOrEqual(0.51 * 10 ** -digits);
};
const share = (value: number, reference: number): number => Math.abs(value / reference - 1);

describe('microstrip of zero thickness (Hammerstad and Jensen 1980)', () => {
  it.each([
    [0.2, 3.66, '138.9917', '2.53400', 138.918, 2.53645],
    [0.5, 4.3, '96.4040', '2.99006', 96.357, 2.99263],
    [1.0, 4.3, '71.7514', '3.10454', 71.728, 3.10612],
    [1.89, 4.3, '50.8993', '3.25975', 50.89, 3.26038],
    [2.0, 3.66, '52.8549', '2.83721', 52.838, 2.83855],
    [1.0, 9.9, '49.0541', '6.64214', 49.067, 6.63757],
    [3.081, 2.2, '50.0195', '1.88120', 49.985, 1.88338],
    [5.0, 3.66, '28.1951', '3.06578', 28.166, 3.07121],
  ])(
    'u = %d, er = %d: %s ohm, %s; the spectral solution agrees within 0.2 %%',
    (u, er, z, ee, zSolved, eeSolved) => {
      const own = microstripPermittivity(u, er);
      const ohm = airMicrostrip(u) / Math.sqrt(own);
      agrees(ohm, z);
      agrees(own, ee);
      expect(share(ohm, zSolved)).toBeLessThan(0.002);
      expect(share(own, eeSolved)).toBeLessThan(0.002);
    },
  );
});

describe('microstrip with thickness (Hammerstad and Jensen 1980)', () => {
  it.each([
    [1.0, 4.3, 0.1, '68.5390', '2.99519', 68.335, 3.0164],
    [1.89, 4.3, 0.1, '49.3663', '3.18113', 49.3, 3.1949],
    [2, 3.66, 0.05, '51.9288', '2.80224', 51.895, 2.8083],
    [0.5, 4.3, 0.2, '86.1987', '2.75347', 85.981, 2.7716],
    [1.8, 4.3, 0.175, '49.9235', '3.12578', 49.834, 3.1454],
  ])('u = %d, er = %d, t/h = %d: %s ohm, %s', (u, er, t, z, ee, zSolved, eeSolved) => {
    const own = thickMicrostripPermittivity(u, t, er);
    const ohm = thickAirMicrostrip(u, t) / Math.sqrt(own);
    agrees(ohm, z);
    agrees(own, ee);
    expect(share(ohm, zSolved)).toBeLessThan(0.0031);
    expect(share(own, eeSolved)).toBeLessThan(0.0071);
  });
  it('tends to the strip of zero thickness', () => {
    expect(thickAirMicrostrip(1.5, 1e-9)).toBeCloseTo(airMicrostrip(1.5), 6);
    expect(thickMicrostripPermittivity(1.5, 1e-9, 4)).toBeCloseTo(microstripPermittivity(1.5, 4), 6);
  });
});

describe('dispersion of a microstrip (Kirschning and Jansen 1982, Jansen and Kirschning 1983)', () => {
  it.each([
    [1, 4.3, 2, '3.11804', '71.7219'],
    [1, 4.3, 10, '3.22634', '72.8873'],
    [2, 3.66, 5, '2.88522', '52.9403'],
    [1, 9.9, 6.35, '6.99799', '49.4968'],
    [3.081, 2.2, 3.175, '1.89045', '50.0235'],
  ])('u = %d, er = %d, fn = %d GHz mm: %s, %s ohm', (u, er, fn, ee, z) => {
    const ee0 = microstripPermittivity(u, er);
    const found = disperseMicrostrip(u, er, fn, ee0, airMicrostrip(u) / Math.sqrt(ee0));
    agrees(found.effectivePermittivity, ee);
    agrees(found.z0Ohm, z);
  });
  it('vanishes towards 0 Hz', () => {
    const found = disperseMicrostrip(1, 4.3, 1e-6, 3.1, 70);
    expect(found.effectivePermittivity).toBeCloseTo(3.1, 6);
    expect(found.z0Ohm).toBeCloseTo(70, 4);
  });
});

describe('pair of microstrips (Kirschning and Jansen 1984)', () => {
  it.each([
    [1, 1, 4.3, '81.752', '61.133', '3.3126', '2.8312', 81.535, 61.213],
    [1.5, 0.8, 4.3, '66.751', '48.560', '3.4225', '2.8830', 66.568, 48.609],
    [1, 0.5, 3.66, '94.072', '57.253', '2.8673', '2.4308', 93.971, 57.352],
    [0.5, 0.3, 9.9, '87.057', '42.655', '6.7583', '5.5690', 87.345, 42.763],
    [2, 2, 4.3, '51.986', '46.252', '3.4617', '3.0722', 52.004, 46.224],
  ])(
    'u = %d, g = %d, er = %d: even %s, odd %s ohm, %s and %s',
    (u, g, er, ze, zo, eeEven, eeOdd, zeSolved, zoSolved) => {
      const pair = kirschningPair(u, g, er);
      agrees(pair.evenZ0Ohm, ze);
      agrees(pair.oddZ0Ohm, zo);
      agrees(pair.evenPermittivity, eeEven);
      agrees(pair.oddPermittivity, eeOdd);
      expect(share(pair.evenZ0Ohm, zeSolved)).toBeLessThan(0.0034);
      expect(share(pair.oddZ0Ohm, zoSolved)).toBeLessThan(0.0034);
    },
  );
});

describe('stripline', () => {
  it.each([
    [0.1, '194.3607', '194.3562'],
    [0.2, '153.1352', '153.1177'],
    [0.35, '120.5183', '120.4692'],
    [0.5, '100.5020', '100.4138'],
    [0.8, '75.9605', '75.8001'],
    [1.0, '65.3989', '65.2066'],
    [2.0, '38.6060', '38.4189'],
  ])('w/b = %d at zero thickness: exact %s, Wheeler %s ohm', (w, exact, wheeler) => {
    agrees(exactStripline(w), exact);
    agrees(wheelerStripline(w, 0), wheeler);
  });
  it.each([
    [0.2, 0.05, '132.2746', 132.259],
    [0.5, 0.05, '90.2436', 90.277],
    [0.5, 0.1, '83.0153', 83.067],
    [0.35, 0.12, '94.5504', 94.527],
    [1.0, 0.1, '55.5161', 55.701],
    [0.5, 0.2, '71.4457', 71.606],
  ])('w/b = %d, t/b = %d (Wheeler 1978): %s ohm, boundary elements within 0.35 %%', (w, t, z, solved) => {
    agrees(wheelerStripline(w, t), z);
    expect(share(wheelerStripline(w, t), solved)).toBeLessThan(0.0035);
  });
  it.each([
    [0.3, 0.3, '149.2680', '107.8598'],
    [0.5, 0.2, '117.1676', '80.1589'],
    [0.35, 0.5, '129.9513', '110.6136'],
  ])('pair of w/b = %d, s/b = %d at zero thickness (Cohn 1955): %s and %s ohm', (w, s, even, odd) => {
    const pair = cohnPair(w, s);
    agrees(pair.even, even);
    agrees(pair.odd, odd);
  });
  it.each([
    [0.3, 0.3, 123.33, 81.488],
    [0.5, 0.2, 99.483, 60.674],
    [0.35, 0.5, 107.087, 87.476],
  ])(
    'pair of w/b = %d, s/b = %d, t/b = 0.1: boundary elements %d and %d ohm within 2.1 %%',
    (w, s, even, odd) => {
      const pair = thickPair(w, s, 0.1);
      expect(share(pair.even, even)).toBeLessThan(0.021);
      expect(share(pair.odd, odd)).toBeLessThan(0.021);
      expect(share(cohnPair(w, s).odd, odd)).toBeGreaterThan(0.14);
    },
  );
});

describe('skin effect and roughness', () => {
  it.each([
    [1e6, 66.086, 5.8e7],
    [1e8, 6.6085, 5.8e7],
    [1e9, 2.0898, 5.8e7],
    [5e9, 0.9346, 5.8e7],
    [1e10, 0.6609, 5.8e7],
    [2.8e10, 0.3949, 5.8e7],
    [1e9, 2.0616, 5.96e7],
  ])('at %d Hz the skin depth is %d um (sigma %d)', (f, um, sigma) => {
    expect(share(skinDepth(f, sigma) * 1e6, um)).toBeLessThan(1e-4);
  });
  it('the surface resistance is 8.250 mohm at 1 GHz and 26.090 at 10 GHz', () => {
    agrees(surfaceResistance(1e9, 5.8e7) * 1e3, '8.250');
    agrees(surfaceResistance(1e10, 5.8e7) * 1e3, '26.090');
  });
  it.each([
    [1, '1.03262', '1.19749', '1.00958', '1.34205', '1.09162', '1.30990'],
    [5, '1.15982', '1.64489', '1.27735', '1.74376', '1.37264', '2.05232'],
    [10, '1.30171', '1.80750', '1.47874', '1.84364', '1.64239', '2.62154'],
    [12.890625, '1.37190', '1.84885', '1.54816', '1.87043', '1.77472', '2.86813'],
    [28, '1.61278', '1.92937', '1.72381', '1.92811', '2.30874', '3.71616'],
  ])(
    'at %d GHz: Hammerstad %s and %s, Groiss %s and %s, cannonball %s and %s',
    (gHz, h4, h10, g4, g10, c3, c6) => {
      const depth = skinDepth(gHz * 1e9, 5.8e7);
      agrees(roughnessFactor({ model: 'hammerstad', rqM: 0.4e-6 }, depth), h4);
      agrees(roughnessFactor({ model: 'hammerstad', rqM: 1e-6 }, depth), h10);
      agrees(roughnessFactor({ model: 'groiss', rqM: 0.4e-6 }, depth), g4);
      agrees(roughnessFactor({ model: 'groiss', rqM: 1e-6 }, depth), g10);
      agrees(roughnessFactor({ model: 'cannonball', rzM: 3e-6 }, depth), c3);
      agrees(roughnessFactor({ model: 'cannonball', rzM: 6e-6 }, depth), c6);
    },
  );
  it('adds nothing to a smooth face or at 0 Hz', () => {
    expect(roughnessFactor({ model: 'none' }, 1e-6)).toBe(1);
    expect(roughnessFactor({ model: 'cannonball', rzM: 3e-6 }, skinDepth(0, 5.8e7))).toBe(1);
    expect(roughnessFactor({ model: 'groiss', rqM: 0 }, 1e-6)).toBe(1);
  });
});

describe('wideband Debye (Djordjevic et al. 2001, Svensson and Dermer 2001)', () => {
  it.each([
    [1e6, '4.56964', '0.018382'],
    [1e8, '4.32321', '0.019441'],
    [1e9, '4.20000', '0.020000'],
    [5e9, '4.11388', '0.020367'],
    [1e10, '4.07679', '0.020486'],
    [2e10, '4.03971', '0.020542'],
  ])('at %d Hz a laminate of 4.2 and 0.02 at 1 GHz has %s and %s', (f, er, tangent) => {
    const material = { dk: 4.2, df: 0.02, atHz: 1e9, dispersion: 'wideband-debye' } as const;
    const [re, im] = permittivity(material, Float64Array.of(f)) as unknown as [number, number];
    agrees(re, er);
    agrees(im / re, tangent);
  });
  it('is finite and real at 0 Hz, and constant where that is asked for', () => {
    const material = { dk: 4.2, df: 0.02, atHz: 1e9, dispersion: 'wideband-debye' } as const;
    const [re, im] = permittivity(material, Float64Array.of(0));
    expect(re).toBeGreaterThan(4.6);
    expect(Math.abs(im!)).toBe(0);
    expect([...permittivity({ ...material, dispersion: 'constant' }, Float64Array.of(1, 1e10))]).toEqual([
      4.2, 0.084, 4.2, 0.084,
    ]);
  });
});
