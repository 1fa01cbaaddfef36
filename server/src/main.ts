import { availableParallelism } from 'node:os';
import { buildServer } from './app';
import { systemClock } from './platform/clock';
import { ConfigError, readConfig } from './platform/config/config';
import { errorFacts, log } from './platform/log';

/** Starts the server from its environment, prints where it listens, and stops in order at SIGTERM. */
async function main(): Promise<void> {
  const config = readConfig(process.env, availableParallelism());
  const server = buildServer(config, systemClock);
  const stop = (signal: string) => {
    log('info', 'stopping', { signal });
    server.stop().then(
      () => process.exit(0),
      (error: unknown) => {
        log('error', 'stop', errorFacts(error));
        process.exit(1);
      },
    );
  };
  process.once('SIGTERM', () => stop('SIGTERM'));
  process.once('SIGINT', () => stop('SIGINT'));
  const { port } = await server.start();
  log('info', 'listening', { port, url: config.url });
  if (!config.demonstration && (await server.features.people.isUnclaimed())) {
    process.stdout.write(`first administrator: ${await server.features.people.firstAdministratorLink()}\n`);
  }
}

main().catch((error: unknown) => {
  if (error instanceof ConfigError) process.stderr.write(`${error.message}\n`);
  else log('error', 'start', errorFacts(error));
  process.exit(1);
});
