import type {
  CrossSection,
  CrossSectionInput,
  FieldProblem,
  Stackup,
  Synthesis,
  SynthesisRequest,
} from '@tollgate/contracts';
import type { SolvedSection } from '@tollgate/elements';

export interface SectionTask {
  readonly kind: 'section';
  readonly stackup: Stackup;
  readonly input: CrossSectionInput;
  readonly sensitivities: boolean;
  /** The section's solution, where the database had it. */
  readonly known?: SolvedSection;
}

export interface SynthesisTask {
  readonly kind: 'synthesis';
  readonly stackup: Stackup;
  readonly wanted: Omit<SynthesisRequest, 'stackup'>;
}

export type DeskTask = SectionTask | SynthesisTask;

/** What a thread hands back; `solved` is the section of the reply, for the database. */
export type DeskResult<Reply> =
  | { readonly ok: true; readonly reply: Reply; readonly solved: SolvedSection }
  | { readonly ok: false; readonly problems: readonly FieldProblem[] };

export type DeskReply<Task extends DeskTask> = Task extends SectionTask ? CrossSection : Synthesis;
