import type { CrossSection, SectionFigures } from '@tollgate/contracts';
import { figureRows, percent } from './figure-rows';
import { pictureOf } from './section-picture';

const mode = (name: 'single' | 'even' | 'odd', z0Ohm: number) => ({
  mode: name,
  z0Ohm,
  effectivePermittivity: 3.6,
  delaySPerM: 6.329e-9,
  conductorLossDbPerM: 12,
  dielectricLossDbPerM: 8,
});
const single = (z0Ohm: number): SectionFigures => ({
  modes: [mode('single', z0Ohm)],
  z0Ohm,
  differentialOhm: null,
  commonOhm: null,
  source: 'test',
});

const section: CrossSection = {
  kind: 'coated-microstrip',
  pair: false,
  standing: 'solved',
  frequencyHz: 1e10,
  figures: single(50),
  closedForm: single(50.5),
  closedFormReason: null,
  differencePercent: 1,
  solver: null,
  planes: { above: null, below: 'L2' },
  drawing: {
    widthM: 1e-3,
    heightM: 0.25e-3,
    sheets: [{ layer: 'D', fromM: 0.05e-3, toM: 0.15e-3, dk: 3.6, df: 0.01 }],
    planes: [{ layer: 'L2', fromM: 0, toM: 0.05e-3 }],
    traces: [
      [
        [-1e-4, 0.15e-3],
        [1e-4, 0.15e-3],
        [0.9e-4, 0.19e-3],
        [-0.9e-4, 0.19e-3],
      ],
    ],
    mask: {
      layer: 'M',
      dk: 3.5,
      outline: [
        [-5e-4, 0.15e-3],
        [-5e-4, 0.17e-3],
        [5e-4, 0.17e-3],
        [5e-4, 0.15e-3],
      ],
    },
  },
  cautions: [],
  sensitivities: [],
};

describe('the figures of a section', () => {
  it('stand beside the closed form with the difference, loss a metre and an inch', () => {
    const rows = new Map(figureRows(section).map((row) => [row.title, row]));
    expect(rows.get('Impedance')).toMatchObject({
      solved: '50.00 ohm',
      closed: '50.50 ohm',
      difference: '+1.00 %',
    });
    expect(rows.get('Delay')!.solved).toBe('6.329 ps/mm');
    expect(rows.get('Loss')!.solved).toBe('20.00 dB/m');
    expect(rows.get('Loss an inch')!.solved).toBe('0.508 dB/in');
  });

  it('leave the closed form empty where there is none', () => {
    const rows = figureRows({ ...section, closedForm: null });
    expect(rows.every(({ closed, difference }) => closed === '' && difference === '')).toBe(true);
  });

  it.each([
    [0.0042, '+0.42 %'],
    [-0.0042, '\u22120.42 %'],
    [-0.00001, '0.00 %'],
  ])('write a share of %d as %s', (share, text) => expect(percent(share)).toBe(text));
});

describe('the picture of a section', () => {
  it('has one scale for both directions, and its mask runs to both edges', () => {
    const picture = pictureOf(section);
    const [left, right] = picture.width;
    const pxPerM = (right - left) / 2e-4;
    expect(picture.planes[0]!.heightPx).toBeCloseTo(0.05e-3 * pxPerM, 6);
    const xs = picture.mask!.outline.split(' ').map((point) => Number(point.split(',')[0]));
    expect([Math.min(...xs), Math.max(...xs)]).toEqual([0, picture.widthPx]);
  });
});
