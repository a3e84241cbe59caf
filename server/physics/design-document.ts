import { z } from 'zod';
import { designFields } from './design-fields';
import { DocumentError, issuesOf } from './document-error';
import type { DocumentIssue } from './document-error';
import { asMeasured, circuit } from './design-schema-circuit';
import { axialCoil, blockMagnet, cylinderMagnet, faceCoil, misalignment } from './design-schema-magnetics';
import { acrossSuspension, damping, movingMass, stops, throughSuspension } from './design-schema-mechanics';
import { quantityOr } from './document-schema';

export { designField, designFields } from './design-fields';
export type { DocumentField } from './design-fields';
export { DocumentError } from './document-error';
export type { DocumentIssue } from './document-error';

/** Format name that a design document carries. */
export const designFormat = 'tremolode-design/1';

/** Most magnets and most coils of one device. */
const mostParts = 40;

const head = {
  format: z.literal(designFormat).default(designFormat),
  title: z.string().max(200).default(''),
};
const surroundings = {
  axisAngle: quantityOr(designFields.axisAngle),
  temperature: quantityOr(designFields.temperature),
  /** Whether recoil permeability lowers the magnetisation through the demagnetising factor. */
  recoil: z.boolean().default(true),
};

const throughDesign = z.strictObject({
  ...head,
  layout: z.literal('through'),
  ...surroundings,
  magnets: z.array(cylinderMagnet).min(1).max(mostParts),
  misalignment,
  coils: z.array(axialCoil).min(1).max(mostParts),
  conductivity: quantityOr(designFields.conductivity),
  movingMass,
  suspension: throughSuspension,
  damping,
  stops,
  circuit,
  asMeasured,
});

const acrossDesign = z.strictObject({
  ...head,
  layout: z.literal('across'),
  ...surroundings,
  magnets: z.array(blockMagnet).min(1).max(mostParts),
  coils: z.array(faceCoil).min(1).max(mostParts),
  conductivity: quantityOr(designFields.conductivity),
  movingMass,
  suspension: acrossSuspension,
  damping,
  stops,
  circuit,
  asMeasured,
});

/**
 * The design document `tremolode-design/1`: takes quantities as SI numbers or texts with a unit and gives the canonical
 * form, SI numbers with every default written out and the keys in schema order.
 */
export const designDocumentSchema = z.discriminatedUnion('layout', [throughDesign, acrossDesign]);

/** A design document in canonical form. SI throughout, temperatures in °C, angles in rad. */
export type DesignDocument = z.output<typeof designDocumentSchema>;
export type ThroughDesign = z.output<typeof throughDesign>;
export type AcrossDesign = z.output<typeof acrossDesign>;
export type CylinderMagnet = z.output<typeof cylinderMagnet>;
export type AxialCoil = z.output<typeof axialCoil>;
export type FaceCoil = z.output<typeof faceCoil>;

/** The canonical form, or everything that keeps the text from being a design document. */
export type DesignReading =
  { readonly ok: true; readonly document: DesignDocument } | { readonly ok: false; readonly issues: DocumentIssue[] };

/** Reads a design document without throwing. Says nothing on whether the parts fit; `fitIssues` does. */
export function readDesignDocument(input: unknown): DesignReading {
  const result = designDocumentSchema.safeParse(input);
  return result.success ? { ok: true, document: result.data } : { ok: false, issues: issuesOf(result.error, input) };
}

/** Reads a design document; throws `DocumentError` with every issue found. */
export function parseDesignDocument(input: unknown): DesignDocument {
  const reading = readDesignDocument(input);
  if (!reading.ok) throw new DocumentError(reading.issues);
  return reading.document;
}
