import type { Deps } from '../../app';
import type { Handlers } from '../../http/handlers';
import { changeInstrument, createInstrument, listInstruments } from './service';

type InstrumentRoutes = 'listInstruments' | 'createInstrument' | 'changeInstrument';

export const instrumentHandlers = (deps: Deps): Pick<Handlers, InstrumentRoutes> => ({
  listInstruments: ({ actor }) => listInstruments(deps, actor),
  createInstrument: ({ body, actor }) => createInstrument(deps, body, actor),
  changeInstrument: ({ params, body, actor }) => changeInstrument(deps, params.instrumentId, body, actor),
});
