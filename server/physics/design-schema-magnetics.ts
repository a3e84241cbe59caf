import { z } from 'zod';
import { catalogueMagnet, catalogueWire, refusedMaterial } from './catalogue';
import { designFields as fields } from './design-fields';
import { fromCatalogue, partName } from './design-schema-catalogue';
import { quantity, quantityOr, quantityOrNull, refuse, sign } from './document-schema';
import type { Context } from './document-schema';

const material = fromCatalogue(
  'magnet material',
  '“NdFeB N42”',
  (key) => catalogueMagnet(key)?.material,
  z
    .strictObject({
      name: partName,
      remanence: quantity(fields['magnets.*.material.remanence']),
      recoilPermeability: quantityOr(fields['magnets.*.material.recoilPermeability']),
      remanencePerKelvin: quantityOr(fields['magnets.*.material.remanencePerKelvin']),
      intrinsicCoercivity: quantity(fields['magnets.*.material.intrinsicCoercivity']),
      intrinsicCoercivityPerKelvin: quantityOrNull(fields['magnets.*.material.intrinsicCoercivityPerKelvin']),
      density: quantity(fields['magnets.*.material.density']),
      maxTemperature: quantityOr(fields['magnets.*.material.maxTemperature']),
    })
    .superRefine((value, context) => {
      const refused = refusedMaterial(value.name);
      if (refused !== undefined) refuse(context, refused, ['name']);
    }),
);

/** Cylinder or ring, magnetised along the axis of travel. */
export const cylinderMagnet = z
  .strictObject({
    shape: z.literal('cylinder').default('cylinder'),
    outerDiameter: quantity(fields['magnets.*{cylinder}.outerDiameter']),
    innerDiameter: quantityOr(fields['magnets.*{cylinder}.innerDiameter']),
    length: quantity(fields['magnets.*{cylinder}.length']),
    at: quantityOr(fields['magnets.*{cylinder}.at'], 0),
    polarity: sign,
    material,
  })
  .superRefine((value, context) => {
    if (value.innerDiameter >= value.outerDiameter) {
      refuse(
        context,
        'the inner diameter must be smaller than the outer diameter',
        ['innerDiameter'],
        value.outerDiameter,
      );
    }
  });

const triple = (x: z.ZodType<number>, y: z.ZodType<number>, h: z.ZodType<number>) => z.tuple([x, y, h]);

/** Block with sides along x, y, z, magnetised along z. */
export const blockMagnet = z.strictObject({
  shape: z.literal('block').default('block'),
  size: triple(
    quantity(fields['magnets.*{block}.size.0']),
    quantity(fields['magnets.*{block}.size.1']),
    quantity(fields['magnets.*{block}.size.2']),
  ),
  at: triple(
    quantity(fields['magnets.*{block}.at.0']),
    quantity(fields['magnets.*{block}.at.1']),
    quantity(fields['magnets.*{block}.at.2']),
  ),
  polarity: sign,
  material,
});

const wire = fromCatalogue(
  'wire',
  '“IEC 0.100 grade 1” or “AWG 38 single”',
  (key) => {
    const found = catalogueWire(key);
    return found && { name: found.key, diameter: found.diameter, overallDiameter: found.overallDiameter };
  },
  z
    .strictObject({
      name: partName,
      diameter: quantity(fields['coils.*.wire.diameter']),
      overallDiameter: quantity(fields['coils.*.wire.overallDiameter']),
    })
    .superRefine((value, context) => {
      if (value.overallDiameter < value.diameter) {
        refuse(
          context,
          'the overall diameter must not be below the bare diameter',
          ['overallDiameter'],
          value.diameter,
        );
      }
    }),
);

const turns = quantity(fields['coils.*.turns']);
const coilLength = quantity(fields['coils.*.length']);

const innerBelowOuter = (value: { innerDiameter: number; outerDiameter: number }, context: Context): void => {
  if (value.innerDiameter >= value.outerDiameter) {
    refuse(
      context,
      'the inner diameter must be smaller than the outer diameter',
      ['innerDiameter'],
      value.outerDiameter,
    );
  }
};

/** Round coil whose axis is the axis of travel. */
export const axialCoil = z
  .strictObject({
    shape: z.literal('round').default('round'),
    innerDiameter: quantity(fields['coils.*{round}.innerDiameter']),
    outerDiameter: quantity(fields['coils.*{round}.outerDiameter']),
    length: coilLength,
    at: quantityOr(fields['coils.*.at'], 0),
    turns,
    sense: sign,
    wire,
  })
  .superRefine(innerBelowOuter);

const place = triple(
  quantity(fields['coils.*.at.0']),
  quantity(fields['coils.*.at.1']),
  quantity(fields['coils.*.at.2']),
);

/** Coils whose axis is z, across the travel. */
export const faceCoil = z.discriminatedUnion('shape', [
  z
    .strictObject({
      shape: z.literal('round'),
      innerDiameter: quantity(fields['coils.*{round}.innerDiameter']),
      outerDiameter: quantity(fields['coils.*{round}.outerDiameter']),
      length: coilLength,
      at: place,
      turns,
      sense: sign,
      wire,
    })
    .superRefine(innerBelowOuter),
  z
    .strictObject({
      shape: z.literal('racetrack'),
      straight: quantity(fields['coils.*{racetrack}.straight']),
      innerEndRadius: quantity(fields['coils.*{racetrack}.innerEndRadius']),
      outerEndRadius: quantity(fields['coils.*{racetrack}.outerEndRadius']),
      length: coilLength,
      at: place,
      turns,
      sense: sign,
      wire,
    })
    .superRefine((value, context) => {
      if (value.innerEndRadius >= value.outerEndRadius) {
        refuse(
          context,
          'the inner end radius must be smaller than the outer one',
          ['innerEndRadius'],
          value.outerEndRadius,
        );
      }
    }),
  z
    .strictObject({
      shape: z.literal('rectangular'),
      inner: z.tuple([
        quantity(fields['coils.*{rectangular}.inner.0']),
        quantity(fields['coils.*{rectangular}.inner.1']),
      ]),
      outer: z.tuple([
        quantity(fields['coils.*{rectangular}.outer.0']),
        quantity(fields['coils.*{rectangular}.outer.1']),
      ]),
      length: coilLength,
      at: place,
      turns,
      sense: sign,
      wire,
    })
    .superRefine((value, context) => {
      for (const side of [0, 1] as const) {
        if (value.inner[side] >= value.outer[side]) {
          refuse(context, 'the inner side must be shorter than the outer one', ['inner', side], value.outer[side]);
        }
      }
    }),
]);

export const misalignment = z
  .strictObject({
    offset: quantityOr(fields['misalignment.offset']),
    tilt: quantityOr(fields['misalignment.tilt']),
  })
  .nullable()
  .prefault({})
  .transform((value) => value ?? { offset: 0, tilt: 0 });
