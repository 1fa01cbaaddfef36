import { kindDescription, type ChannelElement, type Signaling, type Stackup } from '@tollgate/contracts';
import type { PartElement } from './part';
import { padProblems, traceProblems } from './trace';
import type { ElementProblem } from './types';
import { viaProblems } from './via';

/** What can be said of an element before its parts are at hand. */
export function elementProblems(
  element: ChannelElement,
  signaling: Signaling,
  stackup?: Stackup,
): ElementProblem[] {
  const { use, title } = kindDescription(element.kind);
  if (use !== 'both' && use !== signaling) {
    return [
      {
        path: 'kind',
        message: `${title} stands in a ${use} channel, not in a ${signaling} one.`,
        mend: 'Choose another kind, or change the signaling.',
      },
    ];
  }
  switch (element.kind) {
    case 'trace':
      return traceProblems(element, signaling, stackup);
    case 'via':
      return viaProblems(element, signaling, stackup);
    case 'capacitor':
      return padProblems(element, stackup);
    case 'touchstone':
      return fileProblems(element);
    case 'connector':
      return element.circuit ? circuitProblems(element, signaling) : fileProblems(element);
    default:
      return [];
  }
}

function fileProblems(element: PartElement): ElementProblem[] {
  const problems: ElementProblem[] = [];
  const kind =
    element.kind === 'connector'
      ? 'A connector is a Touchstone file or a circuit'
      : 'The part is a Touchstone file';
  if (element.file !== undefined && element.fileId !== undefined) {
    problems.push({
      path: 'file',
      message: 'The part is named twice, by file and by fileId.',
      mend: 'Keep one of the two.',
    });
  }
  if (element.file === undefined && element.fileId === undefined) {
    problems.push({ path: 'file', message: `${kind}; none is named.`, mend: 'Choose or upload a file.' });
  }
  if (element.portOrder !== undefined && element.ports !== undefined) {
    problems.push({
      path: 'ports',
      message: 'portOrder and ports say the same thing twice.',
      mend: 'Keep one of the two.',
    });
  }
  return problems;
}

function circuitProblems(
  element: Extract<ChannelElement, { kind: 'connector' }>,
  signaling: Signaling,
): ElementProblem[] {
  const twice = element.file !== undefined || element.fileId !== undefined;
  const own: ElementProblem[] = twice
    ? [
        {
          path: 'circuit',
          message: 'The connector is given twice, as a file and as a circuit.',
          mend: 'Keep one of the two.',
        },
      ]
    : [];
  const inner = element.circuit!.flatMap((part, i) =>
    elementProblems(part, signaling).map((problem) => ({
      ...problem,
      path: `circuit[${i}].${problem.path}`,
    })),
  );
  return [...own, ...inner];
}
