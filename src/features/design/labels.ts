import { designField } from '#contracts/design-document';
import { readAt } from './document-path';

const groups: Record<string, string> = {
  magnets: 'Magnet',
  coils: 'Coil',
  movingMass: 'Moving mass',
  suspension: 'Suspension',
  damping: 'Damping',
  stops: 'Stops',
  circuit: 'Circuit',
  misalignment: 'Misalignment',
  asMeasured: 'As measured',
};
const others: Record<string, string> = {
  material: 'material',
  wire: 'wire',
  diode: 'diode',
  shape: 'shape',
  polarity: 'north pole',
  sense: 'sense',
  kind: 'kind',
  layout: 'Layout',
  title: 'Title',
  recoil: 'Recoil',
};

/** A value's path in words: “Coil 2, length”. */
export function pathInWords(document: unknown, path: string): string {
  if (path === '') return 'The document';
  const [first = '', second = ''] = path.split('.');
  const numbered = /^\d+$/.test(second);
  const list = readAt(document, first);
  const several = Array.isArray(list) && list.length > 1;
  const group = groups[first];
  const owner = numbered ? `${first}.${second}` : first;
  const kind = readAt(document, `${owner}.${numbered ? 'shape' : 'kind'}`);
  const standard = first === 'magnets' ? 'cylinder' : first === 'coils' ? 'round' : undefined;
  const field = designField(path, typeof kind === 'string' ? kind : standard);
  const last = path.split('.').at(-1) ?? '';
  const name = field?.label ?? others[last] ?? (path === owner ? '' : last);
  if (group === undefined) return name === '' ? path : name;
  const head = numbered && several ? `${group} ${Number(second) + 1}` : group;
  return name === '' || path === owner ? head : `${head}, ${name.charAt(0).toLowerCase()}${name.slice(1)}`;
}

/** A message of the server with the paths in it said in words: “coils.0” becomes “the coil”, “magnets.1” “magnet 2”. */
export function messageInWords(document: unknown, message: string): string {
  return message.replace(/\b(magnets|coils)\.(\d+)\b(?:\.\w+)*/g, (_, list: string, index: string) => {
    const word = list === 'magnets' ? 'magnet' : 'coil';
    const all = readAt(document, list);
    return Array.isArray(all) && all.length > 1 ? `${word} ${Number(index) + 1}` : `the ${word}`;
  });
}
