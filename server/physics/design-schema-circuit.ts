import { z } from 'zod';
import { catalogueDiode, catalogueDiodes } from './catalogue';
import { designFields as fields } from './design-fields';
import { fromCatalogue, partName } from './design-schema-catalogue';
import { firstNotRising, passOn, quantity, quantityList, quantityOr, quantityOrNull, refuse } from './document-schema';

const idealDiode = z.strictObject({ drop: quantity(fields['circuit.diode.drop']) });
const shockleyDiode = z.strictObject({
  name: partName,
  saturationCurrent: quantity(fields['circuit.diode.saturationCurrent']),
  emissionCoefficient: quantityOr(fields['circuit.diode.emissionCoefficient']),
  seriesResistance: quantityOr(fields['circuit.diode.seriesResistance']),
  temperature: quantityOr(fields['circuit.diode.temperature']),
});

const diode = fromCatalogue(
  'diode',
  `“${catalogueDiodes[0]?.key ?? ''}”`,
  (key) => catalogueDiode(key)?.diode,
  z.unknown().transform((input, context) => {
    const schema = typeof input === 'object' && input !== null && 'drop' in input ? idealDiode : shockleyDiode;
    const result = schema.safeParse(input);
    if (result.success) return result.data;
    return passOn(result.error, input, context);
  }),
);

const node = z
  .strictObject({
    sleepCurrent: quantity(fields['circuit.node.sleepCurrent']),
    activeCurrent: quantity(fields['circuit.node.activeCurrent']),
    activeTime: quantity(fields['circuit.node.activeTime']),
    period: quantity(fields['circuit.node.period']),
    minimumVoltage: quantityOr(fields['circuit.node.minimumVoltage']),
  })
  .superRefine((value, context) => {
    if (value.activeTime > value.period) {
      refuse(context, 'the burst must not be longer than the period', ['activeTime'], value.period);
    }
  });

export const circuit = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('resistor'), resistance: quantity(fields['circuit{resistor}.resistance']) }),
  z.strictObject({
    kind: z.literal('bridge'),
    resistance: quantity(fields['circuit{bridge}.resistance']),
    capacitance: quantity(fields['circuit{bridge}.capacitance']),
    diode,
  }),
  z.strictObject({
    kind: z.literal('doubler'),
    resistance: quantity(fields['circuit{doubler}.resistance']),
    capacitance: quantity(fields['circuit{doubler}.capacitance']),
    diode,
  }),
  z.strictObject({ kind: z.literal('store'), voltage: quantity(fields['circuit{store}.voltage']), diode }),
  z.strictObject({
    kind: z.literal('supercapacitor'),
    capacitance: quantity(fields['circuit{supercapacitor}.capacitance']),
    seriesResistance: quantityOr(fields['circuit{supercapacitor}.seriesResistance']),
    leakageResistance: quantity(fields['circuit{supercapacitor}.leakageResistance']),
    initialVoltage: quantityOr(fields['circuit{supercapacitor}.initialVoltage']),
    diode,
    node,
    duration: quantity(fields['circuit{supercapacitor}.duration']),
  }),
  z.strictObject({
    kind: z.literal('tracker'),
    inputResistance: quantity(fields['circuit{tracker}.inputResistance']),
    startVoltage: quantityOr(fields['circuit{tracker}.startVoltage']),
    efficiency: quantityOr(fields['circuit{tracker}.efficiency']),
    diode,
  }),
]);

const measuredCurve = z
  .strictObject({
    position: quantityList(fields['asMeasured.coupling.position'], 2, 2000),
    coupling: quantityList(fields['asMeasured.coupling.coupling'], 2, 2000),
  })
  .superRefine((value, context) => {
    if (value.coupling.length !== value.position.length) {
      refuse(
        context,
        `must be as long as position: ${value.position.length} entries`,
        ['coupling'],
        value.position.length,
      );
    }
    const stuck = firstNotRising(value.position);
    if (stuck >= 0) refuse(context, 'position must rise from entry to entry', ['position', stuck]);
  });
const measuredConstant = quantityOrNull(fields['asMeasured.coupling']);

const measuredCoupling = z
  .unknown()
  .transform((input, context) => {
    const schema = typeof input === 'object' && input !== null ? measuredCurve : measuredConstant;
    const result = schema.safeParse(input);
    if (result.success) return result.data;
    return passOn(result.error, input, context);
  })
  .default(null);

export const asMeasured = z
  .strictObject({
    coilResistance: quantityOrNull(fields['asMeasured.coilResistance']),
    coilInductance: quantityOrNull(fields['asMeasured.coilInductance']),
    coupling: measuredCoupling,
  })
  .nullable()
  .prefault({})
  .transform((value) => value ?? { coilResistance: null, coilInductance: null, coupling: null });
