import type { CompleteChannel } from '@tollgate/contracts';
import { ElementError, sectionKeyOf, type SolvedSection } from '@tollgate/elements';
import { theProduct, type UnitOfWork } from '../../platform/work';
import type { SectionsRepository } from './sections.repository';

/** What a thread is helped with: solutions it may not have, and the traces whose solution nobody has kept yet. */
export interface SectionHelp {
  readonly known: readonly SolvedSection[];
  /** Places in the list of elements. */
  readonly wanted: readonly number[];
}

const mostNoted = 5000;

/** Solved cross-sections shared by threads, nodes and restarts. What was looked up or kept once is not asked for again. */
export class SectionStore {
  private readonly noted = new Set<string>();

  constructor(
    private readonly repository: SectionsRepository,
    private readonly unitOfWork: UnitOfWork,
  ) {}

  async find(key: string): Promise<SolvedSection | undefined> {
    const found = await this.repository.find(key);
    if (found) this.note(key);
    return found;
  }

  async helpFor(channel: CompleteChannel): Promise<SectionHelp> {
    const known: SolvedSection[] = [];
    const wanted: number[] = [];
    const asked = new Set<string>();
    for (const [i, element] of channel.elements.entries()) {
      const key = element.kind === 'trace' ? keyOf(() => sectionKeyOf(channel.stackup, element)) : undefined;
      if (key === undefined || this.noted.has(key) || asked.has(key)) continue;
      asked.add(key);
      const found = await this.find(key);
      if (found) known.push(found);
      else wanted.push(i);
    }
    return { known, wanted };
  }

  async keep(solved: readonly SolvedSection[]): Promise<void> {
    const fresh = solved.filter(({ key }) => !this.noted.has(key));
    if (fresh.length === 0) return;
    await this.unitOfWork(theProduct, async (work) => {
      for (const section of fresh) await this.repository.keep(work, section);
    });
    for (const { key } of fresh) this.note(key);
  }

  private note(key: string): void {
    if (this.noted.size >= mostNoted) this.noted.clear();
    this.noted.add(key);
  }
}

/** A trace that has no section has no key either; the check says what is wrong with it. */
function keyOf(read: () => string): string | undefined {
  try {
    return read();
  } catch (error) {
    if (error instanceof ElementError) return undefined;
    throw error;
  }
}
