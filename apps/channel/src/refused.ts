/** Something the command line cannot do: where, what, and how to mend it; told on standard error, exit code 2. */
export interface Refusal {
  readonly where: string;
  readonly message: string;
  readonly mend?: string;
}

export class Refused extends Error {
  constructor(readonly refusals: readonly Refusal[]) {
    super(refusals.map(spoken).join('\n'));
    this.name = 'Refused';
  }
}

export function refuse(where: string, message: string, mend?: string): never {
  throw new Refused([{ where, message, mend }]);
}

export function spoken({ where, message, mend }: Refusal): string {
  return [where === '' ? message : `${where}: ${message}`, mend].filter(Boolean).join(' ');
}
