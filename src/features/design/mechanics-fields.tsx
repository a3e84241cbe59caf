import { Checkbox } from '../../ui/checkbox';
import { FieldGroup } from '../../ui/form';
import { readAt, writeAt } from './document-path';
import { useDocumentForm } from './document-form';
import { changeKind, layoutOf, newMagnet, suspensions } from './kinds';
import type { SuspensionKind } from './kinds';
import { CylinderFields } from './magnet-fields';
import { PartList } from './part-list';
import { ForceTable } from './force-table';
import { ChoiceAt, fieldAnchor, QuantityAt } from './value-fields';

/** One of two keys of an object; the other one's text waits on the shelf. */
function useEither<T extends string>(path: string, keys: readonly [T, T], starts: Record<T, string>) {
  const { document, change, shelf, valueAt } = useDocumentForm();
  const chosen =
    valueAt(`${path}.${keys[1]}`) !== undefined && valueAt(`${path}.${keys[1]}`) !== null ? keys[1] : keys[0];
  const choose = (to: T) => {
    if (to === chosen) return;
    shelf.set(`${path}.${chosen}`, readAt(document, `${path}.${chosen}`));
    const without = writeAt(document, `${path}.${chosen}`, undefined);
    change(writeAt(without, `${path}.${to}`, shelf.get(`${path}.${to}`) ?? starts[to]));
  };
  return { chosen, choose };
}

export function MassGroup() {
  const { hints } = useDocumentForm();
  const { chosen, choose } = useEither('movingMass', ['total', 'added'], { total: '25 g', added: '15 g' });
  return (
    <FieldGroup title="Moving mass">
      <ChoiceAt
        path="movingMass"
        label="Stated as"
        choices={[
          { value: 'total', label: 'total' },
          { value: 'added', label: 'added' },
        ]}
        read={() => chosen}
        onChoose={choose}
      />
      <QuantityAt
        path={`movingMass.${chosen}`}
        label={chosen === 'total' ? 'All that moves' : 'Besides magnets'}
        hint={chosen === 'added' ? hints.mass : undefined}
      />
    </FieldGroup>
  );
}

const kindOf = (value: unknown): SuspensionKind =>
  typeof value === 'string' && Object.hasOwn(suspensions, value) ? (value as SuspensionKind) : 'spring';

const suspensionWords: Record<SuspensionKind, string> = {
  spring: 'spring',
  helical: 'helical spring',
  levitated: 'levitated',
  table: 'force table',
};

export function SuspensionGroup() {
  const { document, change, shelf, hints, valueAt } = useDocumentForm();
  const kind = kindOf(valueAt('suspension.kind'));
  const across = layoutOf(document) === 'across';
  const choices = (Object.keys(suspensions) as SuspensionKind[])
    .filter((each) => each !== 'levitated' || !across)
    .map((value) => ({ value, label: suspensionWords[value] }));
  return (
    <>
      <FieldGroup title="Suspension">
        <ChoiceAt
          path="suspension.kind"
          label="Kind"
          choices={choices}
          read={kindOf}
          onChoose={(to) => change(changeKind(document, shelf, 'suspension', kind, to, suspensions[to]))}
        />
        {kind === 'spring' ? (
          <>
            <QuantityAt path="suspension.stiffness" kind="spring" hint={hints.stiffness} />
            <QuantityAt path="suspension.cubic" kind="spring" label="Cubic" />
            <QuantityAt path="suspension.neutralAt" label="Neutral at" />
          </>
        ) : null}
        {kind === 'helical' ? (
          <>
            <QuantityAt path="suspension.wireDiameter" kind="helical" label="Wire diameter" />
            <QuantityAt path="suspension.meanDiameter" kind="helical" label="Mean diameter" />
            <QuantityAt path="suspension.activeTurns" kind="helical" hint={hints.stiffness} />
            <QuantityAt path="suspension.springs" kind="helical" label="Springs" />
            <QuantityAt path="suspension.shearModulus" kind="helical" />
            <QuantityAt path="suspension.density" kind="helical" label="Density" />
            <QuantityAt path="suspension.neutralAt" label="Neutral at" />
          </>
        ) : null}
        {kind === 'table' ? <ForceTable hint={hints.stiffness} /> : null}
        {kind === 'levitated' ? (
          <p className="text-right text-sm text-graphite">{hints.stiffness ?? 'between the fixed magnets below'}</p>
        ) : null}
      </FieldGroup>
      {kind === 'levitated' ? (
        <PartList
          path="suspension.fixed"
          name="Fixed magnet"
          start={{ ...newMagnet.through, at: '25 mm', polarity: -1 }}
          most={10}
          aside={() => 'in the coil frame'}
        >
          {(path) => <CylinderFields path={path} />}
        </PartList>
      ) : null}
    </>
  );
}

export function DampingGroup() {
  const { hints } = useDocumentForm();
  const { chosen, choose } = useEither('damping', ['quality', 'coefficient'], {
    quality: '100',
    coefficient: '0.05 N s/m',
  });
  return (
    <FieldGroup title="Damping">
      <ChoiceAt
        path="damping"
        label="Stated as"
        choices={[
          { value: 'quality', label: 'quality factor' },
          { value: 'coefficient', label: 'coefficient' },
        ]}
        read={() => chosen}
        onChoose={choose}
      />
      <QuantityAt
        path={`damping.${chosen}`}
        label={chosen === 'quality' ? 'Quality' : 'Coefficient'}
        hint={chosen === 'quality' ? hints.damping : hints.quality}
      />
      <QuantityAt path="damping.quadratic" />
    </FieldGroup>
  );
}

export function StopsGroup() {
  const { change, document, shelf, readOnly, valueAt, issueAt } = useDocumentForm();
  const stops = valueAt('stops');
  const limited = typeof stops === 'object' && stops !== null;
  const issue = issueAt('stops');
  const toggle = (on: boolean) => {
    if (limited) shelf.set('stops', stops);
    const start = shelf.get('stops') ?? { lower: '-4 mm', upper: '4 mm', stiffness: '100 kN/m', damping: '2 N s/m' };
    change(writeAt(document, 'stops', on ? start : null));
  };
  return (
    <FieldGroup title="Stops" aside={limited ? undefined : 'none'}>
      <div id={fieldAnchor('stops')}>
        {readOnly ? null : (
          <Checkbox
            label="The travel is limited by stops"
            value={limited}
            onChange={toggle}
            error={issue === undefined ? undefined : `Stops: ${issue}.`}
          />
        )}
      </div>
      {limited ? (
        <>
          <QuantityAt path="stops.lower" />
          <QuantityAt path="stops.upper" />
          <QuantityAt path="stops.stiffness" />
          <QuantityAt path="stops.damping" />
        </>
      ) : null}
    </FieldGroup>
  );
}
