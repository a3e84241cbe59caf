import { materialHint } from './hints';
import { layoutOf, newMagnet } from './kinds';
import { PartList } from './part-list';
import { CatalogueAt, QuantityAt, SignAt, TextAt } from './value-fields';
import { useDocumentForm } from './document-form';

const ownMaterial = () => ({
  name: 'as measured',
  remanence: '1.30 T',
  recoilPermeability: '1.05',
  remanencePerKelvin: '-0.12 %/K',
  intrinsicCoercivity: '955 kA/m',
  density: '7500 kg/m³',
  maxTemperature: '80 °C',
});

/** Catalogue grade, or the properties themselves. */
function MaterialAt({ path }: { path: string }) {
  const { valueAt, catalogue } = useDocumentForm();
  const key = valueAt(path);
  const entry = catalogue.find((each) => each.kind === 'magnetMaterial' && each.key === key);
  const own = (name: string) => `${path}.${name}`;
  return (
    <CatalogueAt
      path={path}
      label="Material"
      kind="magnetMaterial"
      own={ownMaterial}
      ownLabel="Own properties"
      hint={materialHint(entry)}
    >
      <TextAt path={own('name')} label="Name" />
      <QuantityAt path={own('remanence')} label="Remanence, 20 °C" />
      <QuantityAt path={own('remanencePerKelvin')} label="Remanence drift" />
      <QuantityAt path={own('recoilPermeability')} />
      <QuantityAt path={own('intrinsicCoercivity')} label="Coercivity, 20 °C" />
      <QuantityAt path={own('intrinsicCoercivityPerKelvin')} label="Coercivity drift" />
      <QuantityAt path={own('density')} />
      <QuantityAt path={own('maxTemperature')} label="Up to" />
    </CatalogueAt>
  );
}

export function CylinderFields({ path }: { path: string }) {
  return (
    <>
      <QuantityAt path={`${path}.outerDiameter`} kind="cylinder" />
      <QuantityAt path={`${path}.innerDiameter`} kind="cylinder" label="Bore" />
      <QuantityAt path={`${path}.length`} kind="cylinder" />
      <QuantityAt path={`${path}.at`} kind="cylinder" label="Position" />
      <SignAt path={`${path}.polarity`} label="North pole" positive="right (+x)" negative="left (−x)" />
      <MaterialAt path={`${path}.material`} />
    </>
  );
}

function BlockFields({ path }: { path: string }) {
  return (
    <>
      <QuantityAt path={`${path}.size.0`} kind="block" label="Along travel" />
      <QuantityAt path={`${path}.size.1`} kind="block" label="Across" />
      <QuantityAt path={`${path}.size.2`} kind="block" label="Thickness" />
      <QuantityAt path={`${path}.at.0`} kind="block" label="Position x" />
      <QuantityAt path={`${path}.at.1`} kind="block" label="Position y" />
      <QuantityAt path={`${path}.at.2`} kind="block" label="Height z" />
      <SignAt path={`${path}.polarity`} label="North pole" positive="up (+z)" negative="down (−z)" />
      <MaterialAt path={`${path}.material`} />
    </>
  );
}

/** The magnets of the moving assembly. */
export function MagnetGroups() {
  const { document, valueAt } = useDocumentForm();
  const layout = layoutOf(document);
  const aside = (index: number) => {
    if (layout === 'across') return 'block';
    const bore = valueAt(`magnets.${index}.innerDiameter`);
    return bore === undefined || bore === 0 || /^0(\.0*)?( mm)?$/.test(String(bore)) ? 'cylinder' : 'ring';
  };
  return (
    <PartList path="magnets" name="Magnet" start={newMagnet[layout]} aside={aside}>
      {(path) => (layout === 'through' ? <CylinderFields path={path} /> : <BlockFields path={path} />)}
    </PartList>
  );
}
