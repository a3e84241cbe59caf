import { FieldGroup } from '../../ui/form';
import { CircuitGroup, MeasuredGroup } from './circuit-fields';
import { CoilGroups } from './coil-fields';
import { useDocumentForm } from './document-form';
import { changeLayout, layoutOf } from './kinds';
import { MagnetGroups } from './magnet-fields';
import { DampingGroup, MassGroup, StopsGroup, SuspensionGroup } from './mechanics-fields';
import { ChoiceAt, QuantityAt, SwitchAt, TextAt } from './value-fields';

function LayoutGroup() {
  const { document, change, shelf } = useDocumentForm();
  return (
    <FieldGroup title="Layout">
      <ChoiceAt
        path="layout"
        label="Magnets pass"
        choices={[
          { value: 'through', label: 'through coils' },
          { value: 'across', label: 'across faces' },
        ]}
        read={() => layoutOf(document)}
        onChoose={(to) => change(changeLayout(document, shelf, to))}
      />
    </FieldGroup>
  );
}

function SurroundingsGroup() {
  const { document } = useDocumentForm();
  return (
    <FieldGroup title="Surroundings">
      <QuantityAt path="temperature" />
      <QuantityAt path="axisAngle" label="Axis above level" />
      <QuantityAt path="conductivity" label="Conductivity" />
      <SwitchAt path="recoil" label="Recoil lowers the magnetisation" fallback />
      {layoutOf(document) === 'through' ? (
        <>
          <QuantityAt path="misalignment.offset" label="Off axis by" />
          <QuantityAt path="misalignment.tilt" label="Tilted by" />
        </>
      ) : null}
      <TextAt path="title" label="Title inside" />
    </FieldGroup>
  );
}

/** The whole document in the order in which one builds the thing. */
export function DesignFields() {
  return (
    <div className="flex flex-col gap-4">
      <MagnetGroups />
      <CoilGroups />
      <MassGroup />
      <SuspensionGroup />
      <DampingGroup />
      <StopsGroup />
      <CircuitGroup />
      <SurroundingsGroup />
      <MeasuredGroup />
      <LayoutGroup />
    </div>
  );
}
