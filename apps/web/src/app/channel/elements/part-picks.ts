import type { PortOrder } from '@tollgate/contracts';

export const orderTitles: Readonly<Record<PortOrder, string>> = {
  '1-3,2-4': '1 to 3, 2 to 4',
  '1-2,3-4': '1 to 2, 3 to 4',
  '1-4,2-3': '1 to 4, 2 to 3',
};

export const interpolationPicks = [
  { value: 'polar', title: 'by magnitude' },
  { value: 'rectangular', title: 'by real part' },
];

export const belowPicks = [
  { value: 'refuse', title: 'not judged there' },
  { value: 'to-dc', title: 'carried on to 0 Hz' },
];

export const wavePicks = [
  { value: 'power', title: 'power waves' },
  { value: 'pseudo', title: 'pseudo waves' },
];
