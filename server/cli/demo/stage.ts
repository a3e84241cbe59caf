import type { DesignCreate } from '#contracts/designs';
import type { Revision, SendEvent } from '#contracts/revisions';
import { signedEvents } from '#workflows/revision';
import type { Actor } from '#workflows/revision';
import type { Deps } from '../../app';
import { createBrief } from '../../features/briefs/service';
import { createDesign, readDesign } from '../../features/designs/service';
import { createInstrument } from '../../features/instruments/service';
import { createPerson } from '../../features/people/service';
import { changeDraft, readRevision, sendEvent } from '../../features/revisions/service';
import { passwordCheck } from '../../features/revisions/signing';
import { addReading, readRun, recordConditions, strikeReading } from '../../features/runs/service';
import { addressOf, briefs, demoPassword, instruments, people } from './team';
import type { BriefKey, InstrumentKey, PersonKey } from './team';

const day = 24 * 60 * 60 * 1000;

/** The words of an event; version, digest and password come from the stage. */
type Words<Event> = Event extends unknown ? Omit<Event, 'version' | 'password' | 'signedDigest' | 'type'> : never;
type WordsOf<Type extends SendEvent['type']> = Words<Extract<SendEvent, { type: Type }>>;

const isSigned = (type: SendEvent['type']): boolean => (signedEvents as readonly string[]).includes(type);

interface ReadingWords {
  /** Title of the run's line. */
  line: string;
  value: number;
  unit: string;
  with: InstrumentKey;
  outOfCalibrationReason?: string;
  note?: string;
}

/** Where the demonstration is played: the real services, on a clock of its own. */
export interface Stage {
  /** Sets the clock: day of the story, time of the day. */
  at(dayOfStory: number, time: string): void;
  brief(who: PersonKey, key: BriefKey): Promise<void>;
  design(who: PersonKey, key: string, brief: BriefKey, title: string): Promise<void>;
  save(
    who: PersonKey,
    key: string,
    change: (document: Record<string, unknown>) => Record<string, unknown>,
  ): Promise<void>;
  send<Type extends SendEvent['type']>(who: PersonKey, key: string, type: Type, words: WordsOf<Type>): Promise<void>;
  /** Closes the first remark that is open. */
  answer(who: PersonKey, key: string, answer: string): Promise<void>;
  /** Opens a run with the next specimen of the revision. */
  startRun(who: PersonKey, key: string): Promise<void>;
  conditions(who: PersonKey, key: string, temperature: number, humidity: number, fixture: string): Promise<void>;
  read(who: PersonKey, key: string, words: ReadingWords): Promise<void>;
  /** Strikes the last reading of the open run. */
  strike(who: PersonKey, key: string, reason: string): Promise<void>;
}

/** Sets the scene: people, instruments, a clock that starts `days` ago. */
export async function openStage(deps: Deps, days: number): Promise<Stage> {
  const start = Math.floor(deps.now().getTime() / day) * day - days * day;
  let clock = start;
  const staged: Deps = { ...deps, now: () => new Date(clock) };
  const confirmPassword = passwordCheck(staged);

  const actors = {} as Record<PersonKey, Actor>;
  for (const key of Object.keys(people) as PersonKey[]) {
    const { name, roles } = people[key];
    const person = { name, email: addressOf(key), roles: [...roles], initialPassword: demoPassword };
    actors[key] = { id: (await createPerson(staged, person, null)).id, roles: [...roles] };
  }
  const instrumentIds = {} as Record<InstrumentKey, string>;
  for (const key of Object.keys(instruments) as InstrumentKey[]) {
    const { dueInDays, ...words } = instruments[key];
    const calibrationDue = new Date(start + (days + dueInDays) * day).toISOString().slice(0, 10);
    instrumentIds[key] = (await createInstrument(staged, { ...words, calibrationDue }, actors.bram)).id;
  }
  const documents = briefs();
  const briefIds: Partial<Record<BriefKey, string>> = {};
  const designIds: Record<string, string> = {};

  /** The latest revision of a design, or the one of a letter where the key names it: “pump A”. */
  const revisionOf = async (key: string, actor: Actor): Promise<Revision> => {
    const [design = '', letter] = key.split(' ');
    const { revisions } = await readDesign(deps, designIds[design] ?? '', actor);
    const line = letter === undefined ? revisions.at(-1) : revisions.find((revision) => revision.letter === letter);
    return readRevision(staged, line?.id ?? '', actor);
  };
  const openRunOf = async (key: string, actor: Actor) => {
    const run = (await revisionOf(key, actor)).runs.find(({ state }) => state === 'open');
    return readRun(staged, run?.id ?? '', actor);
  };

  return {
    at(dayOfStory, time) {
      const [hours = 0, minutes = 0] = time.split(':').map(Number);
      clock = start + dayOfStory * day + (hours * 60 + minutes) * 60_000;
    },
    async brief(who, key) {
      briefIds[key] = (await createBrief(staged, documents[key], actors[who])).id;
    },
    async design(who, key, brief, title) {
      const body: DesignCreate = { title, briefId: briefIds[brief] ?? '' };
      designIds[key] = (await createDesign(staged, body, actors[who])).id;
    },
    async save(who, key, change) {
      const { id, version, document } = await revisionOf(key, actors[who]);
      await changeDraft(staged, id, { version, document: change(document as Record<string, unknown>) }, actors[who]);
    },
    async send(who, key, type, words) {
      const { id, version, digest } = await revisionOf(key, actors[who]);
      const signature = isSigned(type) ? { password: demoPassword, signedDigest: digest } : {};
      const event = { type, version, ...signature, ...words } as SendEvent;
      await sendEvent(staged, id, event, actors[who], confirmPassword);
    },
    async answer(who, key, answer) {
      const { id, version, remarks } = await revisionOf(key, actors[who]);
      const remarkId = remarks.find(({ closed }) => closed === null)?.id ?? '';
      await sendEvent(staged, id, { type: 'closeRemark', version, remarkId, answer }, actors[who], confirmPassword);
    },
    async startRun(who, key) {
      const { id, version, design, letter, runs } = await revisionOf(key, actors[who]);
      const specimen = `${design.number}-${letter}-${String(runs.length + 1).padStart(2, '0')}`;
      await sendEvent(staged, id, { type: 'startRun', version, specimen }, actors[who], confirmPassword);
    },
    async conditions(who, key, temperature, humidity, fixture) {
      const { id } = await openRunOf(key, actors[who]);
      await recordConditions(staged, id, { temperature, humidity, fixture }, actors[who]);
    },
    async read(who, key, words) {
      const { id, lines } = await openRunOf(key, actors[who]);
      const requirement = lines.find((line) => line.requirement.title === words.line)?.requirement;
      const body = {
        requirementId: requirement?.id ?? null,
        quantity: words.line,
        value: words.value,
        unit: words.unit,
        instrumentId: instrumentIds[words.with],
        outOfCalibrationReason: words.outOfCalibrationReason ?? null,
        note: words.note ?? '',
      };
      await addReading(staged, id, body, actors[who]);
    },
    async strike(who, key, reason) {
      const { id, readings } = await openRunOf(key, actors[who]);
      await strikeReading(staged, id, readings.at(-1)?.id ?? '', reason, actors[who]);
    },
  };
}
