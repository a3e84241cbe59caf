import { FieldGroup } from '../../ui/form';
import { useDocumentForm } from './document-form';
import { changeKind, circuits, diodeForms } from './kinds';
import type { CircuitKind } from './kinds';
import { readAt, writeAt } from './document-path';
import { CatalogueAt, ChoiceAt, QuantityAt } from './value-fields';

const kindOf = (value: unknown): CircuitKind =>
  typeof value === 'string' && Object.hasOwn(circuits, value) ? (value as CircuitKind) : 'resistor';

const circuitWords: Record<CircuitKind, string> = {
  resistor: 'resistor',
  bridge: 'bridge',
  doubler: 'doubler',
  store: 'store',
  tracker: 'tracker',
  supercapacitor: 'supercapacitor',
};

/** A diode of the catalogue, its Shockley parameters, or a fixed drop. */
function DiodeAt() {
  const path = 'circuit.diode';
  const { document, valueAt, change, shelf } = useDocumentForm();
  const stored = valueAt(path);
  const form = typeof stored === 'object' && stored !== null && 'drop' in stored ? 'drop' : 'shockley';
  return (
    <CatalogueAt path={path} label="Diode" kind="diode" own={() => diodeForms.shockley} ownLabel="Own parameters">
      <ChoiceAt
        path={`${path}.form`}
        label="Model"
        choices={[
          { value: 'shockley', label: 'Shockley' },
          { value: 'drop', label: 'fixed drop' },
        ]}
        read={() => form}
        onChoose={(to) => change(changeKind(document, shelf, path, form, to, diodeForms[to]))}
      />
      {form === 'drop' ? (
        <QuantityAt path={`${path}.drop`} label="Drop" />
      ) : (
        <>
          <QuantityAt path={`${path}.saturationCurrent`} />
          <QuantityAt path={`${path}.emissionCoefficient`} label="Emission coeff." />
          <QuantityAt path={`${path}.seriesResistance`} label="Series resistance" />
          <QuantityAt path={`${path}.temperature`} label="At" />
        </>
      )}
    </CatalogueAt>
  );
}

const fieldsOf: Record<CircuitKind, readonly string[]> = {
  resistor: ['resistance'],
  bridge: ['resistance', 'capacitance'],
  doubler: ['resistance', 'capacitance'],
  store: ['voltage'],
  tracker: ['inputResistance', 'startVoltage', 'efficiency'],
  supercapacitor: ['capacitance', 'seriesResistance', 'leakageResistance', 'initialVoltage', 'duration'],
};

const nodeFields = ['sleepCurrent', 'activeCurrent', 'activeTime', 'period', 'minimumVoltage'] as const;

export function CircuitGroup() {
  const { document, change, shelf, hints, valueAt } = useDocumentForm();
  const kind = kindOf(valueAt('circuit.kind'));
  return (
    <FieldGroup title="Circuit">
      <ChoiceAt
        path="circuit.kind"
        label="Kind"
        choices={(Object.keys(circuits) as CircuitKind[]).map((value) => ({ value, label: circuitWords[value] }))}
        read={kindOf}
        onChoose={(to) => change(changeKind(document, shelf, 'circuit', kind, to, circuits[to]))}
      />
      {fieldsOf[kind].map((name) => (
        <QuantityAt
          key={`${kind} ${name}`}
          path={`circuit.${name}`}
          kind={kind}
          label={name === 'resistance' ? 'Load' : undefined}
          hint={kind === 'resistor' ? hints.load : undefined}
        />
      ))}
      {kind === 'resistor' ? null : <DiodeAt />}
      {kind === 'supercapacitor' ? (
        <>
          <h3 className="pt-2 text-base">Node</h3>
          {nodeFields.map((name) => (
            <QuantityAt key={name} path={`circuit.node.${name}`} />
          ))}
        </>
      ) : null}
    </FieldGroup>
  );
}

/** What was measured on the thing itself takes the place of what would be computed. */
export function MeasuredGroup() {
  const { document, change, readOnly, valueAt } = useDocumentForm();
  const curve = valueAt('asMeasured.coupling');
  const measured = readAt(document, 'asMeasured');
  if (readOnly && (measured === undefined || measured === null)) return null;
  const stated =
    typeof measured === 'object' && measured !== null && Object.values(measured).some((value) => value !== null);
  return (
    <FieldGroup title="As measured" aside={stated ? 'replaces what is computed' : 'nothing'}>
      <details open={stated}>
        <summary className="pb-1 text-sm text-graphite hover:text-ink">
          Coil and coupling, where they were measured
        </summary>
        <div className="flex flex-col gap-1.5">
          <QuantityAt path="asMeasured.coilResistance" label="Resistance" />
          <QuantityAt path="asMeasured.coilInductance" label="Inductance" />
          {typeof curve === 'object' && curve !== null ? (
            <p className="flex items-center justify-between gap-2 text-sm text-graphite">
              Coupling: a measured curve
              {readOnly ? null : (
                <button
                  type="button"
                  className="link"
                  onClick={() => change(writeAt(document, 'asMeasured.coupling', undefined))}
                >
                  Leave it out
                </button>
              )}
            </p>
          ) : (
            <QuantityAt path="asMeasured.coupling" label="Coupling" />
          )}
        </div>
      </details>
    </FieldGroup>
  );
}
