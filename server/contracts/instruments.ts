import { z } from 'zod';
import { Id, Line, OptionalLine, Version } from './basics';
import { route } from './route';

export const Instrument = z.strictObject({
  id: Id,
  number: z.string(),
  version: Version,
  name: z.string(),
  serial: z.string(),
  location: z.string(),
  /** Day until which the calibration holds, ISO date. */
  calibrationDue: z.iso.date(),
  inCalibration: z.boolean(),
  /** Expanded uncertainty as stated, e.g. “0.5 % of reading, k = 2”. */
  uncertainty: z.string(),
});
export type Instrument = z.infer<typeof Instrument>;

const fields = {
  name: Line,
  serial: Line,
  location: OptionalLine,
  calibrationDue: z.iso.date('Give a day as 2027-03-31.'),
  uncertainty: OptionalLine,
};
export const InstrumentCreate = z.strictObject(fields);
export type InstrumentCreate = z.infer<typeof InstrumentCreate>;
export const InstrumentChange = z.strictObject({ version: Version, ...fields });
export type InstrumentChange = z.infer<typeof InstrumentChange>;

const params = z.strictObject({ instrumentId: Id });
export const instrumentRoutes = {
  listInstruments: route({
    method: 'get',
    path: '/instruments',
    summary: 'The bench instruments',
    allowed: ['designer', 'reviewer', 'bench', 'releaseAuthority', 'administrator'],
    answer: z.strictObject({ instruments: z.array(Instrument), mayChange: z.boolean() }),
  }),
  createInstrument: route({
    method: 'post',
    path: '/instruments',
    summary: 'Register an instrument',
    allowed: ['bench'],
    body: InstrumentCreate,
    status: 201,
    answer: Instrument,
  }),
  changeInstrument: route({
    method: 'put',
    path: '/instruments/:instrumentId',
    summary: 'Change an instrument',
    allowed: ['bench'],
    params,
    body: InstrumentChange,
    answer: Instrument,
  }),
};
