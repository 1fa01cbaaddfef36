import { refuse } from './refused';

/** What was asked for on the command line. */
export interface Command {
  readonly file: string;
  /** Where the response goes; `-` is standard output, in place of the verdict. */
  readonly response?: string;
  readonly touchstone?: string;
}

const usage = 'Write: npm run -s channel -- FILE [--response OUT.json] [--touchstone OUT.sNp]';
const options = ['response', 'touchstone'] as const;

/** @throws Refused with the usage */
export function readCommand(words: readonly string[]): Command {
  const files: string[] = [];
  const given: Partial<Record<(typeof options)[number], string>> = {};
  for (let k = 0; k < words.length; k++) {
    const word = words[k]!;
    if (!word.startsWith('--')) {
      files.push(word);
      continue;
    }
    const [name, attached] = word.slice(2).split(/=(.*)/s);
    const option = options.find((known) => known === name);
    if (!option) refuse(word, 'This option is not known.', usage);
    if (given[option] !== undefined) refuse(word, 'This option is given twice.', usage);
    const value = attached ?? words[++k];
    if (!value) refuse(word, 'The option needs a file name.', usage);
    given[option] = value;
  }
  const [file, another] = files;
  if (file === undefined) refuse('', 'No channel file is named.', usage);
  if (another !== undefined) refuse(another, 'One channel file is checked at a time.', usage);
  if (given.touchstone === '-') refuse('--touchstone', 'Touchstone output needs a file name.', usage);
  return { file, ...given };
}
