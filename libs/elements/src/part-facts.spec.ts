import type { PartFacts } from '@tollgate/contracts';
import { partWarnings } from './part-facts';

const sound: Omit<PartFacts, 'element'> = {
  ...{
    fileName: 'a.s2p',
    sha256: '',
    ports: 2,
    points: 5,
    bandHz: [1e7, 1e9],
    portOrder: '1-2',
    reversed: false,
  },
  quality: {
    passivity: { percent: 100, grade: 'good', failsHz: [] },
    reciprocity: { percent: 100, grade: 'good', failsHz: [] },
    causality: { percent: 95, grade: 'good', failsHz: [[1e8, 2e8]] },
  },
  ...{ gapsHz: [], reachesDc: false, phaseStepDeg: 20, interpolationErrorAbs: 0 },
};

describe('the warnings of a file', () => {
  it('are none where it is sound', () => {
    expect(partWarnings(sound)).toEqual([]);
  });

  it('name a slight lack of passivity, graded good as it may be, with its frequencies', () => {
    const passivity = { percent: 99.99, grade: 'good' as const, failsHz: [[1e8, 3e8]] as [number, number][] };
    const [words] = partWarnings({ ...sound, quality: { ...sound.quality!, passivity } });
    expect(words).toBe('a.s2p is graded good (99.99 %) as passive; it is not from 0.1 GHz to 0.3 GHz.');
  });

  it('name poor causality, gaps and phase steps too wide to read between', () => {
    const causality = { percent: 12, grade: 'poor' as const, failsHz: [] };
    const words = partWarnings({
      ...sound,
      quality: { ...sound.quality!, causality },
      gapsHz: [
        [1e9, 2e9],
        [3e9, 4e9],
      ],
      phaseStepDeg: 97.4,
    });
    expect(words).toEqual([
      'a.s2p is graded poor (12.00 %) as causal.',
      'a.s2p has no points from 1 GHz to 2 GHz, from 3 GHz to 4 GHz: what is read there is a guess.',
      expect.stringContaining('turns by up to 97 degrees'),
    ]);
  });
});
