import { wireHint } from './hints';
import { coilShapes, layoutOf, newCoil } from './kinds';
import type { CoilShape } from './kinds';
import { readAt, writeAt } from './document-path';
import { PartList } from './part-list';
import { CatalogueAt, ChoiceAt, QuantityAt, SignAt } from './value-fields';
import { useDocumentForm } from './document-form';

const ownWire = () => ({ diameter: '0.1 mm', overallDiameter: '0.117 mm' });

/** Catalogue wire, or its two diameters. The fill is of the whole document, so it stands under the last coil. */
function WireAt({ path, last }: { path: string; last: boolean }) {
  const { valueAt, catalogue, hints } = useDocumentForm();
  const key = valueAt(path);
  const entry = catalogue.find((each) => each.kind === 'wire' && each.key === key);
  const hint = [wireHint(entry), last ? hints.fill : undefined].filter(Boolean).join(' · ');
  return (
    <CatalogueAt
      path={path}
      label="Wire"
      kind="wire"
      own={ownWire}
      ownLabel="Own diameters"
      hint={hint === '' ? undefined : hint}
    >
      <QuantityAt path={`${path}.diameter`} label="Bare" />
      <QuantityAt path={`${path}.overallDiameter`} label="Overall" />
    </CatalogueAt>
  );
}

function WindingFields({ path, last }: { path: string; last: boolean }) {
  const { hints } = useDocumentForm();
  return (
    <>
      <QuantityAt path={`${path}.turns`} hint={last ? hints.winding : undefined} />
      <SignAt path={`${path}.sense`} label="Sense" positive="forward" negative="reversed" />
      <WireAt path={`${path}.wire`} last={last} />
    </>
  );
}

const shapeChoices = [
  { value: 'round', label: 'round' },
  { value: 'racetrack', label: 'racetrack' },
  { value: 'rectangular', label: 'rectangular' },
] as const;

const shapeOf = (value: unknown): CoilShape => (value === 'racetrack' || value === 'rectangular' ? value : 'round');

function FlatFields({ path, last }: { path: string; last: boolean }) {
  const { document, valueAt, change, shelf } = useDocumentForm();
  const shape = shapeOf(valueAt(`${path}.shape`));
  const choose = (to: CoilShape) => {
    const before = readAt(document, path) as Record<string, unknown>;
    shelf.set(`${path} ${shape}`, before);
    const kept = (shelf.get(`${path} ${to}`) ?? coilShapes[to]) as Record<string, unknown>;
    const shared = {
      length: before.length,
      at: before.at,
      turns: before.turns,
      sense: before.sense,
      wire: before.wire,
    };
    change(writeAt(document, path, { ...kept, ...shared, shape: to }));
  };
  return (
    <>
      <ChoiceAt path={`${path}.shape`} label="Shape" choices={shapeChoices} read={shapeOf} onChoose={choose} />
      {shape === 'round' ? (
        <>
          <QuantityAt path={`${path}.innerDiameter`} kind="round" />
          <QuantityAt path={`${path}.outerDiameter`} kind="round" />
        </>
      ) : null}
      {shape === 'racetrack' ? (
        <>
          <QuantityAt path={`${path}.straight`} kind="racetrack" />
          <QuantityAt path={`${path}.innerEndRadius`} kind="racetrack" />
          <QuantityAt path={`${path}.outerEndRadius`} kind="racetrack" />
        </>
      ) : null}
      {shape === 'rectangular' ? (
        <>
          <QuantityAt path={`${path}.inner.0`} kind="rectangular" label="Inner, along" />
          <QuantityAt path={`${path}.inner.1`} kind="rectangular" label="Inner, across" />
          <QuantityAt path={`${path}.outer.0`} kind="rectangular" label="Outer, along" />
          <QuantityAt path={`${path}.outer.1`} kind="rectangular" label="Outer, across" />
        </>
      ) : null}
      <QuantityAt path={`${path}.length`} label="Thickness" />
      <QuantityAt path={`${path}.at.0`} label="Position x" />
      <QuantityAt path={`${path}.at.1`} label="Position y" />
      <QuantityAt path={`${path}.at.2`} label="Height z" />
      <WindingFields path={path} last={last} />
    </>
  );
}

/** The coils, all in series. */
export function CoilGroups() {
  const { document, valueAt } = useDocumentForm();
  const layout = layoutOf(document);
  const coils = valueAt('coils');
  const count = Array.isArray(coils) ? coils.length : 0;
  const aside = (index: number) =>
    layout === 'through' ? 'round, through' : `${shapeOf(valueAt(`coils.${index}.shape`))}, across`;
  return (
    <PartList path="coils" name="Coil" start={newCoil[layout]} aside={aside}>
      {(path, index) =>
        layout === 'through' ? (
          <>
            <QuantityAt path={`${path}.innerDiameter`} kind="round" />
            <QuantityAt path={`${path}.outerDiameter`} kind="round" />
            <QuantityAt path={`${path}.length`} />
            <QuantityAt path={`${path}.at`} kind="round" label="Position" />
            <WindingFields path={path} last={index === count - 1} />
          </>
        ) : (
          <FlatFields path={path} last={index === count - 1} />
        )
      }
    </PartList>
  );
}
