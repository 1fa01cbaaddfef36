import type { Sequelize } from 'sequelize';
import type { Config } from '../../src/platform/config/config';
import { actorOf, type Caller } from '../../src/platform/http';
import type { UnitOfWork } from '../../src/platform/work';
import type { BoardsService } from '../../src/features/boards';
import type { ChannelsService } from '../../src/features/channels';
import type { FilesService } from '../../src/features/files';
import type { MasksRepository } from '../../src/features/masks';
import type { StackupsService } from '../../src/features/stackups';
import { createPeopleRepository, type PeopleService } from '../../src/features/people';
import { backplaneChannels, lineCardChannels, type DemoChannel, type DemoFiles } from './channels';
import { demoParts, streamOf } from './parts';
import { seedPeople, type DemoPeople } from './people';
import { lineCardStackups } from './stackups';

export interface SeedNeeds {
  readonly config: Config;
  readonly sequelize: Sequelize;
  readonly people: PeopleService;
  readonly boards: BoardsService;
  readonly files: FilesService;
  readonly channels: ChannelsService;
  readonly masks: MasksRepository;
  readonly stackups: StackupsService;
  readonly unitOfWork: UnitOfWork;
}

/** Fills an empty database with invented people and boards; does nothing where anyone exists. */
export async function seedDemonstration(needs: SeedNeeds): Promise<void> {
  if (!(await needs.people.isUnclaimed())) return;
  const people = await seedPeople(needs.config, createPeopleRepository(needs.sequelize), needs.unitOfWork);
  const sets = await needs.masks.latest();
  const mask = (key: string) => sets.find((set) => set.key === key)!;

  const heron = await makeBoard(
    needs,
    people,
    'Heron line card',
    'Switch, mezzanine and module cages; the demonstration board.',
    ['2026-06-30', '2026-12-18'],
  );
  for (const [seen, version] of lineCardStackups.entries())
    await needs.stackups.create(people.engineer, heron.revisionId, seen, version);
  await fill(needs, people.engineer, heron.boardId, heron.revisionId, (files) =>
    lineCardChannels(files, mask('93-KR4-IL'), mask('83E-C2M-IL')),
  );

  const petrel = await makeBoard(
    needs,
    people,
    'Petrel backplane',
    'Five slots, one pair of each checked so far.',
    ['2027-02-26'],
  );
  await fill(needs, people.second, petrel.boardId, petrel.revisionId, (files) =>
    backplaneChannels(files, mask('69B-KR-IL')),
  );
}

/** A board with everyone on it; each further date is a further revision, the last one stays open. */
async function makeBoard(
  { boards }: SeedNeeds,
  people: DemoPeople,
  name: string,
  description: string,
  releases: readonly string[],
): Promise<{ boardId: string; revisionId: string }> {
  const board = await boards.create(people.engineer, { name, description });
  for (const person of [people.second, people.reviewer, people.manager, people.librarian])
    await boards.addMember(people.engineer, board.id, person.id);
  let revisionId = board.revisions[0]!.id;
  await boards.changeRevision(people.engineer, revisionId, board.id, {
    releaseOn: releases[0],
    archived: releases.length > 1,
  });
  for (const releaseOn of releases.slice(1))
    revisionId = (await boards.createRevision(people.engineer, board.id, { releaseOn })).id;
  return { boardId: board.id, revisionId };
}

async function fill(
  needs: SeedNeeds,
  by: Caller,
  boardId: string,
  revisionId: string,
  documents: (files: DemoFiles) => DemoChannel[],
): Promise<void> {
  const { files, boards, channels, unitOfWork } = needs;
  const { mezzanine, launch } = demoParts();
  const add = async (part: typeof mezzanine): Promise<string> => {
    const received = await files.receivePart(part.name, streamOf(part), 'file');
    return unitOfWork(actorOf(by), (work) => files.keepPart(work, boardId, received));
  };
  const made = { mezzanine: await add(mezzanine), launch: await add(launch) };
  const links = new Map<string, string>();
  for (const { link, document } of documents(made)) {
    if (!links.has(link)) links.set(link, (await boards.createLink(by, revisionId, boardId, link)).id);
    await channels.create(by, boardId, revisionId, document, links.get(link)!);
  }
}
