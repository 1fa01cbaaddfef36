import type { MaskDocument } from '../src/features/masks';

export interface MaskSeed {
  readonly key: string;
  readonly document: MaskDocument;
}

/** Insertion-loss sum of Annex 69B: the fitted-attenuation maximum, 0.8 dB, and 0.2 dB a GHz, f in GHz. */
const backplaneLoss =
  '8.685889638*(2.0e-5*sqrt(f*1e9) + 1.1e-10*f*1e9 + 3.2e-20*(f*1e9)^2 - 1.2e-30*(f*1e9)^3) + 0.8 + 0.2*f';

interface Facts {
  readonly key: string;
  readonly title: string;
  readonly standard: string;
  readonly clause: string;
  readonly from: string;
  readonly to: string;
  readonly includes: string[];
  readonly segments: { fromHz: number; toHz: number; formula: string }[];
  readonly beyond: string[];
  readonly confidence: string;
}

function insertionLossSet(facts: Facts): MaskSeed {
  const { key, title, standard, clause, from, to, includes, segments, beyond, confidence } = facts;
  const status = 'informative';
  const limit = {
    title,
    quantity: 'insertion-loss' as const,
    sense: 'max' as const,
    segments,
    referenceOhm: 100,
    status: status as 'informative',
    includes,
    source: `${standard}, ${clause}`,
    beyond,
  };
  return {
    key,
    document: {
      title,
      standard,
      clause,
      status,
      from,
      to,
      referenceOhm: 100,
      limits: [limit],
      beyond,
      confidence,
    },
  };
}

/** Published insertion-loss limits, exactly these three; test points and the informative status are from memory of the clauses. */
export const maskSeeds: readonly MaskSeed[] = [
  insertionLossSet({
    key: '69B-KR-IL',
    title: '10GBASE-KR insertion loss',
    standard: 'IEEE Std 802.3-2022',
    clause: 'Annex 69B, 69B.4.3',
    from: 'TP1',
    to: 'TP4',
    includes: ['backplane', 'connectors', 'line cards'],
    segments: [
      { fromHz: 0.05e9, toHz: 6e9, formula: backplaneLoss },
      { fromHz: 6e9, toHz: 15e9, formula: `${backplaneLoss} + 10*(f - 6)` },
    ],
    beyond: [
      'fitted attenuation (69B.4.2)',
      'insertion loss deviation (69B.4.4)',
      'return loss (69B.4.5)',
      'crosstalk ratio (69B.4.6)',
    ],
    confidence:
      'Two public witnesses of the coefficients; 25.19 dB at 5.15625 GHz agrees with a published 25 dB figure.',
  }),
  insertionLossSet({
    key: '93-KR4-IL',
    title: '100GBASE-KR4 insertion loss',
    standard: 'IEEE Std 802.3-2022',
    clause: '93.9.2',
    from: 'TP0',
    to: 'TP5',
    includes: ['host boards', 'connectors', 'backplane'],
    segments: [
      { fromHz: 0.05e9, toHz: 12.890625e9, formula: '1.5 + 4.6*sqrt(f) + 1.318*f' },
      { fromHz: 12.890625e9, toHz: 25.78125e9, formula: '-12.71 + 3.7*f' },
    ],
    beyond: [
      'channel operating margin of at least 3 dB (the normative test)',
      'return loss (93.9.3)',
      'crosstalk',
    ],
    confidence:
      'One public witness; 35.0 dB at 12.890625 GHz agrees with the published headline. A recommendation: the operating margin is what the clause requires.',
  }),
  insertionLossSet({
    key: '83E-C2M-IL',
    title: 'CAUI-4 chip-to-module insertion loss',
    standard: 'IEEE Std 802.3-2022',
    clause: 'Annex 83E, 83E.1',
    from: 'host chip',
    to: 'module chip',
    includes: ['host board', 'connector', 'module board'],
    segments: [
      { fromHz: 0.01e9, toHz: 14e9, formula: '1.076*(0.075 + 0.537*sqrt(f) + 0.566*f)' },
      { fromHz: 14e9, toHz: 18.75e9, formula: '1.076*(-18 + 2*f)' },
    ],
    beyond: [
      'return loss and mode conversion of host and module',
      'eye height and width at the compliance points',
      'crosstalk',
    ],
    confidence:
      'One public witness; 10.0 dB at 12.89 GHz agrees with a published budget of 7.3 + 1.2 + 1.5 dB.',
  }),
];
