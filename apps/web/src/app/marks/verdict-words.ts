import type { ChannelVerdict, LimitStatus } from '@tollgate/contracts';

const words: Readonly<Record<ChannelVerdict, string>> = {
  holds: 'Holds',
  exceeds: 'Exceeds',
  'inside-guard-band': 'Inside the guard band',
  'not-judged': 'Not judged',
  'not-checked': 'Not checked',
};

const statusWords: Readonly<Record<LimitStatus, string>> = {
  normative: '',
  informative: 'informative limit',
  headline: 'headline value only',
  proposal: 'proposed limit',
  own: 'own limit',
};

/** A verdict's word; it carries the status of the limit behind it: "Holds, informative limit". */
export function verdictWord(verdict: ChannelVerdict, status?: string | null): string {
  const word = words[verdict];
  const addition = isStatus(status) && isJudged(verdict) ? statusWords[status] : '';
  return addition === '' ? word : `${word}, ${addition}`;
}

function isStatus(status: string | null | undefined): status is LimitStatus {
  return status !== null && status !== undefined && status in statusWords;
}

function isJudged(verdict: ChannelVerdict): boolean {
  return verdict === 'holds' || verdict === 'exceeds' || verdict === 'inside-guard-band';
}
