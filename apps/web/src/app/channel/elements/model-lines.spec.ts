import { modelLines } from './model-lines';

describe('the lines of a model', () => {
  it('tell a pair by its differential and common impedance', () => {
    const lines = modelLines({
      ...{ kind: 'trace', element: 'T1', source: 'field solution', unknowns: 120, errorZ0: 0.0007 },
      ...{ errorPermittivity: 0.001, validToHz: null, planes: { above: 'L2', below: null } },
      modes: [
        { mode: 'even', z0Ohm: 60, effectivePermittivity: 3.5 },
        { mode: 'odd', z0Ohm: 45, effectivePermittivity: 3.4 },
      ],
      sheets: [{ layer: 'PP1', thicknessM: 1e-4, dk: 3.6, df: 0.006, atHz: 1e10 }],
    });
    expect(lines[0]).toBe('90 ohm differential, 30 ohm common; odd 45 ohm, even 60 ohm');
    expect(lines.join('. ')).toContain('Returns on L2 above');
    expect(lines.join('. ')).toContain('mesh error of Z0 0.07 %');
  });

  it('tell a via by its stubs and the range of its model', () => {
    const lines = modelLines({
      ...{ kind: 'via', element: 'V1', sources: ['coaxial line'], meshErrorShare: 0, sections: [] },
      ...{ throughM: 0.3e-3, stubs: { aboveM: 0, belowM: 1.2e-3 }, notchHz: 26e9, validToHz: 13e9 },
    });
    expect(lines).toEqual([
      '0.3 mm in the path, stubs 1.2 mm below',
      'Notch of its own at 26 GHz',
      'Estimated to 13 GHz; above that out of range',
      'By coaxial line',
    ]);
  });
});
