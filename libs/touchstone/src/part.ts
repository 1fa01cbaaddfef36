import type { Network, WaveDefinition } from '@tollgate/network';
import { toPowerWaves, uniformReference } from '@tollgate/network';
import type { TouchstoneFile } from './touchstone-file';
import { TouchstoneError } from './touchstone-file';

/** Whether the wave definition of the file must be known before its numbers can be used. */
export function needsWaves(file: TouchstoneFile): boolean {
  return file.complexReference || file.perPointReferenceOhm !== undefined;
}

/**
 * The file's network as power waves in constant, real references: its own where they are that, else `referenceOhm` (all ports)
 * once it is known which waves the numbers mean.
 * @throws TouchstoneError where references are complex or change from point to point and `waves` is not given
 */
export function networkOfFile(file: TouchstoneFile, waves?: WaveDefinition, referenceOhm = 50): Network {
  if (!needsWaves(file)) return file.network;
  if (!waves) {
    throw new TouchstoneError(
      file.fileName,
      0,
      file.perPointReferenceOhm
        ? 'The references stand in comments behind every point and differ from the option line.'
        : 'The references are complex.',
      'Say whether the numbers are power or pseudo waves, or export the file renormalised to a real reference.',
    );
  }
  return toPowerWaves(
    file.network,
    waves,
    uniformReference(file.network.ports, referenceOhm),
    file.perPointReferenceOhm,
  );
}
