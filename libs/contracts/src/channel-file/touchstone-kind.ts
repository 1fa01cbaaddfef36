import * as z from 'zod';
import { bounds } from '../bounds';

const portNumber = z
  .int('A port is a whole number, counted from 1.')
  .min(1, 'Ports are counted from 1.')
  .max(bounds.ports, `A file has at most ${bounds.ports} ports.`);

export const portOrders = ['1-3,2-4', '1-2,3-4', '1-4,2-3'] as const;
export type PortOrder = (typeof portOrders)[number];

export const portPicks = z.union([
  z.strictObject({ nearP: portNumber, nearN: portNumber, farP: portNumber, farN: portNumber }),
  z.strictObject({ near: portNumber, far: portNumber }),
]);
export type PortPicks = z.output<typeof portPicks>;

/** Characters that could leave the channel file's folder are refused where the path is resolved. */
const partPath = z
  .string({ error: 'The file is a path relative to the channel file.' })
  .min(1, 'Name the file.')
  .max(bounds.textCharacters, `A path has at most ${bounds.textCharacters} characters.`);

/** A part given by its scattering parameters. Exactly one of `file` and `fileId` is checked by readChannel. */
export const touchstoneFields = {
  file: partPath.optional(),
  fileId: z.uuid('A file is named by its identifier.').optional(),
  portOrder: z.enum(portOrders, `A port order is one of ${portOrders.join('; ')}.`).optional(),
  ports: portPicks.optional(),
  interpolation: z.enum(['polar', 'rectangular'], 'Interpolation is polar or rectangular.').default('polar'),
  reversed: z.boolean().default(false),
  below: z
    .enum(['refuse', 'to-dc'], 'Below its band a part is refused or carried on to 0 Hz (to-dc).')
    .default('refuse'),
  above: z.enum(['refuse'], 'Above its band a part is refused.').default('refuse'),
  waves: z.enum(['power', 'pseudo'], 'Waves are power or pseudo.').optional(),
  /** A person has looked at a port order that the data could not tell. */
  portOrderConfirmed: z.boolean().optional(),
};
