import { solveSection } from './solve';
import { outer, share, strip, um } from './testing/sections';

const h = 200 * um;
const thin = 1e-9;
const b = 400 * um;

/**
 * Values that independent solutions gave for the shapes of published tables (formulas B1, B3, B5, B7): a spectral Galerkin method for strips
 * of no thickness, good to about 0.1 %, and boundary elements for thick ones.
 */
describe('the field solution against independent ones of the published tables', () => {
  it.each([
    [0.2, 3.66, 138.918, 2.53645],
    [0.5, 4.3, 96.357, 2.99263],
    [1.0, 4.3, 71.728, 3.10612],
    [1.89, 4.3, 50.89, 3.26038],
    [2.0, 3.66, 52.838, 2.83855],
    [1.0, 9.9, 49.067, 6.63757],
    [3.081, 2.2, 49.985, 1.88338],
    [5.0, 3.66, 28.166, 3.07121],
  ])('a thin microstrip of w/h %p on %p: Z0 and permittivity to 0.2 %%', (u, er, z0Ohm, ee) => {
    const { single } = solveSection(outer(u * h, thin, h, er)).modes;
    expect(share(single!.z0Ohm, z0Ohm)).toBeLessThan(2e-3);
    expect(share(single!.effectivePermittivity, ee)).toBeLessThan(2e-3);
  });

  it.each([
    [1, 0.1, 4.3, 68.335, 3.0164],
    [1.89, 0.1, 4.3, 49.3, 3.1949],
    [2, 0.05, 3.66, 51.895, 2.8083],
    [0.5, 0.2, 4.3, 85.981, 2.7716],
    [1.8, 0.175, 4.3, 49.834, 3.1454],
  ])('a microstrip of w/h %p, t/h %p on %p: in air to 0.02 %%, filled to 0.55 %%', (u, t, er, z0Ohm, ee) => {
    const { single } = solveSection(outer(u * h, t * h, h, er)).modes;
    expect(share(single!.airOhm, z0Ohm * Math.sqrt(ee))).toBeLessThan(2e-4);
    // The boundary elements cut the dielectric's face coarser; finite elements elsewhere here are met to 0.1 %.
    expect(share(single!.effectivePermittivity, ee)).toBeLessThan(5.5e-3);
    expect(share(single!.z0Ohm, z0Ohm)).toBeLessThan(3e-3);
  });

  it.each([
    [1, 1, 4.3, [81.535, 61.213], [3.322, 2.8284]],
    [1.5, 0.8, 4.3, [66.568, 48.609], [3.4303, 2.8812]],
    [1, 0.5, 3.66, [93.971, 57.352], [2.8738, 2.4268]],
    [0.5, 0.3, 9.9, [87.345, 42.763], [6.7603, 5.5509]],
    [2, 2, 4.3, [52.004, 46.224], [3.4562, 3.0778]],
  ] as const)('thin microstrips of w/h %p, s/h %p on %p: even and odd to 0.2 %%', (u, g, er, z0, ee) => {
    const { even, odd } = solveSection(outer(u * h, thin, h, er, g * h)).modes;
    [even!, odd!].forEach((mode, i) => {
      expect(share(mode.z0Ohm, z0[i]!)).toBeLessThan(2e-3);
      expect(share(mode.effectivePermittivity, ee[i]!)).toBeLessThan(2e-3);
    });
  });

  it.each([
    [0.2, 0.05, 132.259],
    [0.5, 0.05, 90.277],
    [0.5, 0.1, 83.067],
    [0.35, 0.12, 94.527],
    [1.0, 0.1, 55.701],
    [0.5, 0.2, 71.606],
  ])('a thick strip line of w/b %p, t/b %p: Z0 to 0.2 %%', (w, t, z0Ohm) => {
    const half = (b - t * b) / 2;
    expect(share(solveSection(strip(w * b, t * b, half, half, 1)).modes.single!.z0Ohm, z0Ohm)).toBeLessThan(
      2e-3,
    );
  });

  it.each([
    [0.3, 0.3, 123.33, 81.488],
    [0.5, 0.2, 99.483, 60.674],
    [0.35, 0.5, 107.087, 87.476],
  ])('strip lines of w/b %p, s/b %p, t/b 0.1: even and odd to 0.2 %%', (w, s, evenOhm, oddOhm) => {
    const { even, odd } = solveSection(strip(w * b, 0.1 * b, 0.45 * b, 0.45 * b, 1, s * b)).modes;
    expect(share(even!.z0Ohm, evenOhm)).toBeLessThan(2e-3);
    expect(share(odd!.z0Ohm, oddOhm)).toBeLessThan(2e-3);
  });
});
