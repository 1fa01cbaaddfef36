import type { Sequelize } from 'sequelize';
import { maskSeeds, seedDemonstration } from '../../seeds';
import type { Clock } from '../platform/clock';
import type { Config } from '../platform/config/config';
import { FileStore } from '../platform/files';
import { sweepSessions, type Route } from '../platform/http';
import { holdMode } from '../platform/config/mode';
import { errorFacts, log } from '../platform/log';
import { JobRunner, type JobHandler } from '../platform/jobs';
import { mailHandler } from '../platform/mail';
import { createUnitOfWork, theProduct } from '../platform/work';
import { apiDocsRoutes } from './api-docs';
import { boardRoutes, createBoardsRepository, createBoardsService, revisionRoutes } from './boards';
import {
  channelRoutes,
  closeDraftJob,
  createChannelsRepository,
  createChannelsService,
  createDraftEvents,
  createExchangeService,
  createResolveChannel,
  planRoutes,
} from './channels';
import { CheckPool, createChecksRepository, createSectionsRepository, SectionStore } from './checks';
import { demoMailRoutes } from './demo-mail';
import { eventsRoutes } from './events';
import { createFilesRepository, createFilesService, fileRoutes } from './files';
import { healthRoutes } from './health';
import { createMasksRepository, maskRoutes } from './masks';
import { createPeopleRepository, createPeopleService, peopleRoutes } from './people';
import { createPassport, createThrottle, sessionRoutes } from './session';
import { sheetRoutes } from './sheets';
import {
  createFollowStackup,
  createStackupsRepository,
  createStackupsService,
  createUseStackup,
  DeskService,
  stackupRoutes,
} from './stackups';
import { ChangeFeed, streamRoutes } from './stream';

const dayMs = 24 * 3600 * 1000;
const sender = 'Tollgate <tollgate@tollgate.invalid>';

export type Features = ReturnType<typeof createFeatures>;

/** Every feature, put together: the one place that knows them all. */
export function createFeatures(config: Config, clock: Clock, sequelize: Sequelize) {
  const handlers = new Map<string, JobHandler>();
  const jobs = new JobRunner(sequelize, clock, handlers);
  const unitOfWork = createUnitOfWork(sequelize, clock, () => jobs.wake());
  const store = new FileStore(config.dataDirectory);
  const sectionRows = createSectionsRepository(sequelize);
  const sections = new SectionStore(sectionRows, unitOfWork);
  const pool = new CheckPool(config.checkThreads, sections);
  const feed = new ChangeFeed(sequelize);

  const people = createPeopleService({
    config,
    sequelize,
    unitOfWork,
    repository: createPeopleRepository(sequelize),
  });
  const throttle = createThrottle(sequelize, clock);
  const passport = createPassport(people, throttle);
  const masks = createMasksRepository(sequelize);
  const files = createFilesService({ repository: createFilesRepository(sequelize), store, unitOfWork });
  const checks = createChecksRepository(sequelize);
  const channelRows = createChannelsRepository(sequelize);
  const drafts = createDraftEvents(channelRows, unitOfWork);
  const resolve = createResolveChannel(files, masks);
  const stackupRows = createStackupsRepository(sequelize);
  const desk = new DeskService(sections);
  const channels = createChannelsService({
    config,
    repository: channelRows,
    checks,
    pool,
    resolve,
    follow: createFollowStackup(stackupRows),
    drafts,
    unitOfWork,
  });
  const exchange = createExchangeService({ channels, repository: channelRows, files, store });
  const boardRows = createBoardsRepository(sequelize);
  const stackups = createStackupsService({ repository: stackupRows, boards: boardRows, unitOfWork });
  const use = createUseStackup({
    repository: stackupRows,
    channels: channelRows,
    boards: boardRows,
    drafts,
    unitOfWork,
  });
  const boards = createBoardsService({
    repository: boardRows,
    people,
    unitOfWork,
    copyChannels: (...copied) => channels.copy(...copied),
    startStackup: (...started) => stackups.start(...started),
  });

  handlers.set('mail', mailHandler(sequelize, clock, config.smtpUrl, sender));
  handlers.set('recheck', (payload) => channels.recheck((payload as { channelId: string }).channelId));
  handlers.set(closeDraftJob, (payload) => {
    const { channelId, personId } = payload as { channelId: string; personId: string };
    return drafts.close(channelId, personId);
  });
  handlers.set('sweep', async () => {
    const now = clock.now();
    await store.sweep(new Date(now.getTime() - dayMs));
    await sweepSessions(sequelize);
    await throttle.sweep();
    await feed.sweep(new Date(now.getTime() - dayMs));
    await checks.sweep(new Date(now.getTime() - dayMs));
    await sectionRows.sweep(new Date(now.getTime() - 90 * dayMs));
    await jobs.sweep(new Date(now.getTime() - 7 * dayMs));
    await jobs.queue('sweep', {}, 'sweep-next', new Date(now.getTime() + dayMs));
  });

  const routes: Route[] = [
    ...healthRoutes(sequelize, config),
    ...apiDocsRoutes(() => routes),
    ...sessionRoutes({ config, clock, people, passport, throttle }),
    ...peopleRoutes(people),
    ...eventsRoutes(sequelize),
    ...demoMailRoutes(config),
    ...maskRoutes(masks),
    ...boardRoutes(boards),
    ...revisionRoutes(boards, boardRows),
    ...fileRoutes(files),
    ...channelRoutes({ channels, exchange, repository: channelRows, boards: boardRows }),
    ...planRoutes(channelRows, boardRows),
    ...stackupRoutes({ stackups, use, desk, repository: stackupRows, boards: boardRows }),
    ...sheetRoutes({ config, clock, channels, boardOf: (channelId) => channelRows.boardOf(channelId) }),
    ...streamRoutes(feed, boardRows.isMember),
  ];

  return {
    routes,
    passport,
    people,
    jobs,
    store,
    unitOfWork,
    isMember: boardRows.isMember,
    async prepare(): Promise<void> {
      await store.prepare();
      await holdMode(config.dataDirectory, config.demonstration);
    },

    /** What every installation has, and in a demonstration the invented boards. */
    async seed(): Promise<void> {
      await unitOfWork(theProduct, async (work) => {
        for (const { key, document } of maskSeeds) await masks.put(work, key, document);
      });
      if (config.demonstration)
        await seedDemonstration({
          config,
          sequelize,
          people,
          boards,
          files,
          channels,
          masks,
          stackups,
          unitOfWork,
        });
    },

    begin(): void {
      jobs.start();
      jobs
        .queue('sweep', {}, 'sweep', clock.now())
        .catch((error: unknown) => log('warning', 'sweep', errorFacts(error)));
    },

    async end(): Promise<void> {
      feed.stop();
      await jobs.stop();
      await Promise.all([pool.stop(), desk.stop()]);
    },
  };
}
