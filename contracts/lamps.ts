import * as z from 'zod';
import { clashes } from './clashes.ts';
import { id, inShop } from './common.ts';
import { csvExport, csvImport, csvReport } from './csv.ts';
import { endpoint } from './endpoint.ts';
import { thingName } from './places.ts';

const version = z.number().int().min(1);
const kilowatts = z.number().min(0.01).max(10_000);

export const circuitFields = z.strictObject({
  name: thingName,
  /** What its lamps may draw together. */
  kilowatts,
  /** Where the kilowatts come from, as far as somebody entered it: volts between the lines that feed the lamps. */
  volts: z.number().min(1).max(1000).nullable(),
  phases: z.union([z.literal(1), z.literal(3)]).nullable(),
  breakerAmperes: z.number().min(1).max(1000).nullable(),
});
export type CircuitFields = z.output<typeof circuitFields>;
export const circuit = circuitFields.extend({ id, version });
export type Circuit = z.output<typeof circuit>;

export const lampFields = z.strictObject({
  name: thingName,
  circuitId: id,
  kilowatts,
  wave: z.enum(['short', 'medium']),
});
export type LampFields = z.output<typeof lampFields>;
export const lamp = lampFields.extend({ id, version, retired: z.boolean() });
export type Lamp = z.output<typeof lamp>;

const oneLamp = inShop.extend({ lampId: id });
const oneCircuit = inShop.extend({ circuitId: id });

export const listLamps = endpoint({
  name: 'list-lamps',
  method: 'GET',
  path: '/api/shops/:shopId/lamps',
  params: inShop,
  reply: z.strictObject({ lamps: z.array(lamp), circuits: z.array(circuit) }),
});
export const createLamp = endpoint({
  name: 'create-lamp',
  method: 'POST',
  path: '/api/shops/:shopId/lamps',
  params: inShop,
  body: lampFields,
  reply: z.strictObject({ lamp, clashes }),
});
export const changeLamp = endpoint({
  name: 'change-lamp',
  method: 'PATCH',
  path: '/api/shops/:shopId/lamps/:lampId',
  params: oneLamp,
  body: lampFields.partial().extend({ version }),
  reply: z.strictObject({ lamp, clashes }),
});
/** Refused with the work that counts on it where posted work is still to be done under it. */
export const retireLamp = endpoint({
  name: 'retire-lamp',
  method: 'POST',
  path: '/api/shops/:shopId/lamps/:lampId/retire',
  params: oneLamp,
  body: z.strictObject({ version }),
  reply: lamp,
});
export const bringBackLamp = endpoint({
  name: 'bring-back-lamp',
  method: 'POST',
  path: '/api/shops/:shopId/lamps/:lampId/bring-back',
  params: oneLamp,
  body: z.strictObject({ version }),
  reply: lamp,
});
export const orderLamps = endpoint({
  name: 'order-lamps',
  method: 'POST',
  path: '/api/shops/:shopId/lamps-order',
  params: inShop,
  body: z.strictObject({ lampIds: z.array(id).min(1).max(500) }),
});

export const createCircuit = endpoint({
  name: 'create-circuit',
  method: 'POST',
  path: '/api/shops/:shopId/circuits',
  params: inShop,
  body: circuitFields,
  reply: z.strictObject({ circuit, clashes }),
});
export const changeCircuit = endpoint({
  name: 'change-circuit',
  method: 'PATCH',
  path: '/api/shops/:shopId/circuits/:circuitId',
  params: oneCircuit,
  body: circuitFields.partial().extend({ version }),
  reply: z.strictObject({ circuit, clashes }),
});
/** Refused while a lamp hangs on it, a retired one too. */
export const removeCircuit = endpoint({
  name: 'remove-circuit',
  method: 'DELETE',
  path: '/api/shops/:shopId/circuits/:circuitId',
  params: oneCircuit,
  body: z.strictObject({ version }),
});

export const exportLamps = endpoint({
  name: 'export-lamps',
  method: 'GET',
  path: '/api/shops/:shopId/lamps-csv',
  params: inShop,
  reply: csvExport,
});
export const importLamps = endpoint({
  name: 'import-lamps',
  method: 'POST',
  path: '/api/shops/:shopId/lamps-csv',
  params: inShop,
  body: csvImport,
  reply: csvReport,
});
