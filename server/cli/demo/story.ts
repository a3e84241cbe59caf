import type { Stage } from './stage';

/** One thing that somebody does, on a day of the story. */
export interface Scene {
  day: number;
  time: string;
  play: (stage: Stage) => Promise<void>;
}

const scene = (day: number, time: string, play: Scene['play']): Scene => ({ day, time, play });

/** Days that the story takes; the last is yesterday. */
export const storyDays = 42;

const beginnings: Scene[] = [
  scene(0, '08:10', (stage) => stage.brief('maren', 'feedPump')),
  scene(0, '09:45', (stage) => stage.brief('maren', 'circulationPump')),
  scene(1, '08:30', (stage) => stage.brief('idris', 'fan')),
  scene(3, '13:20', (stage) => stage.brief('idris', 'conveyor')),
  scene(9, '10:05', (stage) => stage.brief('jonna', 'wagon')),
];

const swapLoad = (resistance: string) => (document: Record<string, unknown>) => ({
  ...document,
  circuit: { kind: 'resistor', resistance },
});

/** Released, drafted again, released again: revision A is superseded by B. */
const feedPump: Scene[] = [
  scene(1, '10:00', (stage) => stage.design('maren', 'feed', 'feedPump', 'Pump-side node, 50 Hz')),
  scene(2, '09:15', (stage) => stage.save('maren', 'feed', swapLoad('780 ohm'))),
  scene(2, '09:40', (stage) =>
    stage.send('maren', 'feed', 'submit', { note: 'First of the family; coil as wound for the trials.' }),
  ),
  scene(3, '10:30', (stage) =>
    stage.send('sunniva', 'feed', 'remark', {
      text: 'How far is the winding from the magnet at full travel? The drawing leaves 1 mm.',
      blocking: false,
      target: 'coils.0.innerDiameter',
    }),
  ),
  scene(3, '14:05', (stage) =>
    stage.answer('maren', 'feed', '1 mm on the radius over the whole travel; former of 0.4 mm wall.'),
  ),
  scene(4, '08:50', (stage) =>
    stage.send('sunniva', 'feed', 'approve', { note: 'Spring rate and load checked by hand.' }),
  ),
  scene(5, '09:00', (stage) => stage.startRun('bram', 'feed')),
  scene(5, '09:20', (stage) => stage.conditions('bram', 'feed', 22.4, 41, 'Shaker table, cube adapter, 0.5 N·m')),
  scene(5, '10:10', (stage) =>
    stage.read('bram', 'feed', { line: 'Coil resistance', value: 104.6, unit: 'Ω', with: 'meter' }),
  ),
  scene(5, '11:00', (stage) =>
    stage.read('bram', 'feed', { line: 'Power into the load', value: 1.236e-3, unit: 'mW', with: 'analyser' }),
  ),
  scene(5, '11:05', (stage) =>
    stage.read('bram', 'feed', { line: 'Voltage at the load', value: 0.982, unit: 'V', with: 'analyser' }),
  ),
  scene(5, '13:30', (stage) =>
    stage.send('bram', 'feed', 'signResult', {
      result: 'conforming',
      statement: 'At 1.00 m/s² peak, 50.00 Hz, after ten minutes of warming up.',
    }),
  ),
  scene(6, '09:30', (stage) =>
    stage.send('ottilie', 'feed', 'release', { statement: 'For the pilot batch of twelve.' }),
  ),
  scene(10, '08:40', (stage) =>
    stage.send('maren', 'feed', 'rework', { reason: 'Thinner wire: the node’s regulator wants more voltage.' }),
  ),
  scene(10, '09:30', (stage) =>
    stage.save('maren', 'feed', (document) => ({
      ...document,
      coils: (document['coils'] as Record<string, unknown>[]).map((coil) => ({
        ...coil,
        turns: 1200,
        wire: 'IEC 0.090 grade 1',
      })),
      circuit: { kind: 'resistor', resistance: '1150 ohm' },
    })),
  ),
  scene(11, '10:15', (stage) =>
    stage.send('maren', 'feed', 'submit', { note: 'Only coil and load differ from revision A.' }),
  ),
  scene(12, '09:20', (stage) => stage.send('idris', 'feed', 'approve', { note: '' })),
];

/** Opens a run and says under which conditions. */
const startRun = (key: string, day: number, who: 'bram' | 'edda' = 'bram'): Scene[] => [
  scene(day, '08:30', (stage) => stage.startRun(who, key)),
  scene(day, '08:45', (stage) => stage.conditions(who, key, 21.8, 44, 'Shaker table, cube adapter, 0.5 N·m')),
];

/** Designs the starting point of a brief and submits it as it is. */
const draw = (
  who: 'maren' | 'idris' | 'jonna',
  key: string,
  brief: Parameters<Stage['design']>[2],
  title: string,
  day: number,
): Scene[] => [
  scene(day, '10:00', (stage) => stage.design(who, key, brief, title)),
  scene(day, '14:30', (stage) => stage.send(who, key, 'submit', {})),
];

const feedPumpB: Scene[] = [
  ...startRun('feed', 13),
  scene(13, '09:30', (stage) =>
    stage.read('bram', 'feed', { line: 'Coil resistance', value: 155.1, unit: 'Ω', with: 'meter' }),
  ),
  scene(13, '10:00', (stage) =>
    stage.read('bram', 'feed', { line: 'Power into the load', value: 1.251e-3, unit: 'mW', with: 'analyser' }),
  ),
  scene(13, '10:02', (stage) =>
    stage.read('bram', 'feed', { line: 'Voltage at the load', value: 1.199, unit: 'V', with: 'analyser' }),
  ),
  scene(13, '11:15', (stage) =>
    stage.send('bram', 'feed', 'signResult', { result: 'conforming', statement: 'Same set-up as for revision A.' }),
  ),
  scene(14, '09:00', (stage) =>
    stage.send('ottilie', 'feed', 'release', { statement: 'Replaces revision A from batch 2 on.' }),
  ),
  scene(14, '09:25', (stage) =>
    stage.send('ottilie', 'feed A', 'supersede', { reason: 'Revision B gives the regulator its voltage with margin.' }),
  ),
];

/** Changes requested; revision B waits in review with a blocking remark. */
const circulationPump: Scene[] = [
  ...draw('maren', 'circulation', 'circulationPump', 'Circulation pump node, 49 Hz', 30),
  scene(31, '09:10', (stage) =>
    stage.send('sunniva', 'circulation', 'remark', {
      text: 'A quality of 150 at 49 Hz leaves a band of a third of a hertz. Does the slip stay inside it?',
      blocking: true,
      target: 'damping.quality',
    }),
  ),
  scene(31, '16:00', (stage) =>
    stage.send('sunniva', 'circulation', 'requestChanges', {
      reason: 'Either show that the speed holds within a third of a hertz, or damp the device and show what is left.',
    }),
  ),
  scene(33, '08:20', (stage) =>
    stage.send('maren', 'circulation', 'rework', { reason: 'Heavier load: broader, for a little less power.' }),
  ),
  scene(33, '09:05', (stage) => stage.save('maren', 'circulation', swapLoad('560 ohm'))),
  scene(34, '08:55', (stage) =>
    stage.send('maren', 'circulation', 'submit', {
      note: 'The load is what changed; the survey shows ±0.2 Hz over a week.',
    }),
  ),
  scene(38, '11:40', (stage) =>
    stage.send('sunniva', 'circulation', 'remark', {
      text: 'The survey covers one week in spring. What is the slip under full summer load?',
      blocking: true,
      target: 'suspension.stiffness',
    }),
  ),
];

/** Released and recalled. */
const ringMagnet: Scene[] = [
  scene(8, '09:00', (stage) => stage.design('idris', 'ring', 'circulationPump', 'Circulation pump node, ring magnet')),
  scene(8, '09:50', (stage) =>
    stage.save('idris', 'ring', (document) => ({
      ...document,
      magnets: (document['magnets'] as Record<string, unknown>[]).map((magnet) => ({
        ...magnet,
        innerDiameter: '3 mm',
      })),
    })),
  ),
  scene(8, '10:20', (stage) =>
    stage.send('idris', 'ring', 'submit', { note: 'Ring for a through-bolt instead of glue.' }),
  ),
  scene(9, '09:30', (stage) => stage.send('sunniva', 'ring', 'approve', { note: 'Bolt is non-magnetic, as noted.' })),
  ...startRun('ring', 15),
  scene(15, '09:40', (stage) =>
    stage.read('bram', 'ring', {
      line: 'Natural frequency, not below',
      value: 48.93,
      unit: 'Hz',
      with: 'accelerometer',
    }),
  ),
  scene(15, '09:41', (stage) =>
    stage.read('bram', 'ring', {
      line: 'Natural frequency, not above',
      value: 48.93,
      unit: 'Hz',
      with: 'accelerometer',
    }),
  ),
  scene(15, '10:30', (stage) =>
    stage.read('bram', 'ring', { line: 'Power into the load', value: 2.41e-3, unit: 'mW', with: 'analyser' }),
  ),
  scene(15, '13:00', (stage) =>
    stage.send('bram', 'ring', 'signResult', { result: 'conforming', statement: 'Steady over half an hour.' }),
  ),
  scene(16, '08:45', (stage) => stage.send('ottilie', 'ring', 'release', { statement: 'For the pumps in hall 2.' })),
  scene(28, '15:10', (stage) =>
    stage.send('ottilie', 'ring', 'recall', {
      reason: 'Two rings cracked at the bore during assembly; the bolt’s torque has to be looked at.',
    }),
  ),
];

/** Cleared for the bench. */
const fanPedestal: Scene[] = [
  ...draw('idris', 'pedestal', 'fan', 'Fan bearing node, pedestal', 32),
  scene(35, '10:20', (stage) =>
    stage.send('sunniva', 'pedestal', 'approve', { note: 'Margin on power is thin; watch it on the bench.' }),
  ),
];

/** On the bench, one reading with an instrument out of calibration, one struck through. */
const fanMotor: Scene[] = [
  ...draw('maren', 'motor', 'fan', 'Fan bearing node, motor side', 34),
  scene(36, '09:00', (stage) => stage.send('idris', 'motor', 'approve', { note: '' })),
  ...startRun('motor', 40),
  scene(40, '09:35', (stage) =>
    stage.read('bram', 'motor', {
      line: 'Power into the load',
      value: 18.9e-3,
      unit: 'mW',
      with: 'analyser',
      note: 'Range switch?',
    }),
  ),
  scene(40, '09:40', (stage) => stage.strike('bram', 'motor', 'Range of the analyser was wrong by a factor of ten.')),
  scene(40, '09:45', (stage) =>
    stage.read('bram', 'motor', { line: 'Power into the load', value: 1.893e-3, unit: 'mW', with: 'analyser' }),
  ),
  scene(40, '10:30', (stage) =>
    stage.read('bram', 'motor', {
      line: 'Power into the load',
      value: 1.87e-3,
      unit: 'mW',
      with: 'scope',
      outOfCalibrationReason: 'Only as a cross-check; the analyser’s reading decides.',
    }),
  ),
];

/** Short of its requirement, granted a concession, in the release review. */
const fanDuct: Scene[] = [
  ...draw('maren', 'duct', 'fan', 'Fan duct node', 20),
  scene(21, '11:00', (stage) => stage.send('edda', 'duct', 'approve', { note: '' })),
  ...startRun('duct', 24, 'edda'),
  scene(24, '10:00', (stage) =>
    stage.read('edda', 'duct', { line: 'Power into the load', value: 1.724e-3, unit: 'mW', with: 'analyser' }),
  ),
  scene(24, '10:20', (stage) =>
    stage.read('edda', 'duct', { line: 'Travel', value: 2.81e-3, unit: 'mm', with: 'accelerometer' }),
  ),
  scene(24, '13:10', (stage) =>
    stage.send('edda', 'duct', 'signResult', {
      result: 'nonconforming',
      statement: 'Power is 4 % below the requirement at the stated vibration; everything else is as estimated.',
    }),
  ),
  scene(37, '09:15', (stage) =>
    stage.send('ottilie', 'duct', 'grantConcession', {
      shortfall: 'Power into the load 1.72 mW instead of 1.80 mW',
      reason: 'The node sends every 25 s instead of every 20 s; the customer has agreed in writing.',
    }),
  ),
];

/** Nonconforming, undecided. */
const conveyorPlate: Scene[] = [
  ...draw('idris', 'plate', 'conveyor', 'Conveyor side-plate node', 22),
  scene(25, '10:00', (stage) =>
    stage.send('sunniva', 'plate', 'approve', { note: 'Cross-checked against the survey of both tones.' }),
  ),
  ...startRun('plate', 36),
  scene(36, '09:50', (stage) =>
    stage.read('bram', 'plate', { line: 'Power into the load', value: 2.71e-3, unit: 'mW', with: 'analyser' }),
  ),
  scene(36, '10:15', (stage) =>
    stage.read('bram', 'plate', { line: 'Travel', value: 9.2e-3, unit: 'mm', with: 'accelerometer' }),
  ),
  scene(37, '11:00', (stage) =>
    stage.send('bram', 'plate', 'signResult', {
      result: 'nonconforming',
      statement:
        'A quarter less power than estimated. The guide rubs at the lower end of the travel; marks on the sleeve.',
    }),
  ),
];

/** Conforming, waits for a release authority other than its author. */
const feedPumpBack: Scene[] = [
  ...draw('jonna', 'back', 'feedPump', 'Feed pump node, non-drive end', 33),
  scene(35, '13:30', (stage) => stage.send('edda', 'back', 'approve', { note: 'Same coil as FN-001 A.' })),
  ...startRun('back', 38),
  scene(38, '09:20', (stage) =>
    stage.read('bram', 'back', { line: 'Coil resistance', value: 103.9, unit: 'Ω', with: 'meter' }),
  ),
  scene(38, '10:00', (stage) =>
    stage.read('bram', 'back', { line: 'Power into the load', value: 1.262e-3, unit: 'mW', with: 'analyser' }),
  ),
  scene(38, '10:05', (stage) =>
    stage.read('bram', 'back', { line: 'Voltage at the load', value: 0.991, unit: 'V', with: 'analyser' }),
  ),
  scene(39, '09:10', (stage) =>
    stage.send('bram', 'back', 'signResult', {
      result: 'conforming',
      statement: 'Three specimens, the weakest is stated.',
    }),
  ),
];

const wagonAndOthers: Scene[] = [
  // Abandoned.
  scene(12, '13:00', (stage) => stage.design('idris', 'unbalance', 'conveyor', 'Conveyor motor node')),
  scene(18, '16:20', (stage) =>
    stage.send('idris', 'unbalance', 'abandon', { reason: 'The motor is replaced by one with a wired sensor.' }),
  ),
  // In review, random vibration.
  scene(37, '10:00', (stage) => stage.design('jonna', 'frame', 'wagon', 'Bogie frame node')),
  scene(39, '15:00', (stage) =>
    stage.send('jonna', 'frame', 'submit', {
      note: 'Figures are over one record of ten seconds; other seeds give a few per cent.',
    }),
  ),
  // Changes requested, nobody has started the next revision yet.
  ...draw('maren', 'light', 'feedPump', 'Feed pump node, light', 38),
  scene(40, '14:00', (stage) =>
    stage.send('idris', 'light', 'requestChanges', {
      reason: 'Say what is lighter: the moving mass is that of FN-001.',
    }),
  ),
  // A draft in the middle of being typed: the wire does not exist.
  scene(40, '16:00', (stage) => stage.design('jonna', 'axle', 'wagon', 'Axle-box node')),
  scene(41, '09:30', (stage) =>
    stage.save('jonna', 'axle', (document) => ({
      ...document,
      coils: (document['coils'] as Record<string, unknown>[]).map((coil) => ({
        ...coil,
        turns: 2400,
        wire: 'IEC 0.06',
      })),
    })),
  ),
  // A sound draft, ready to be submitted.
  scene(41, '10:15', (stage) =>
    stage.design('maren', 'quiet', 'circulationPump', 'Circulation pump node, quiet hours'),
  ),
];

/** The whole story in the order of its days. */
export const story: Scene[] = [
  ...beginnings,
  ...feedPump,
  ...feedPumpB,
  ...circulationPump,
  ...ringMagnet,
  ...fanPedestal,
  ...fanMotor,
  ...fanDuct,
  ...conveyorPlate,
  ...feedPumpBack,
  ...wagonAndOthers,
].sort((a, b) => a.day - b.day || (a.time < b.time ? -1 : a.time > b.time ? 1 : 0));
