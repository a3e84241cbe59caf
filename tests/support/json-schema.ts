type Schema = Record<string, unknown>;

const isObject = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

const typeOf = (value: unknown): string[] => {
  if (value === null) return ['null'];
  if (Array.isArray(value)) return ['array'];
  if (typeof value === 'number') return Number.isInteger(value) ? ['integer', 'number'] : ['number'];
  return [typeof value];
};

/** Keywords this knows; a schema with another one fails, so that nothing passes unlooked at. */
const known = new Set([
  ...['$ref', 'type', 'enum', 'const', 'anyOf', 'oneOf', 'allOf', 'properties', 'required', 'additionalProperties'],
  ...['propertyNames', 'items', 'prefixItems', 'minItems', 'maxItems', 'minLength', 'maxLength', 'minimum', 'maximum'],
  ...['exclusiveMinimum', 'exclusiveMaximum', 'format', 'pattern', 'description', 'default', 'discriminator'],
]);

/** Faults of a value against a JSON schema of an OpenAPI document, each with its path. Independent of what made the schema. */
export function schemaFaults(document: Schema, schema: unknown, value: unknown, path = '$'): string[] {
  if (schema === undefined || schema === true || !isObject(schema)) return [];
  const odd = Object.keys(schema).filter((keyword) => !known.has(keyword));
  if (odd.length > 0) return [`${path}: the schema has ${odd.join(', ')}`];
  const check = (inner: unknown, part: unknown, at: string) => schemaFaults(document, inner, part, at);
  if (typeof schema.$ref === 'string') {
    const target = schema.$ref
      .slice(2)
      .split('/')
      .reduce<unknown>((part, key) => (isObject(part) ? part[key] : undefined), document);
    return target === undefined ? [`${path}: ${schema.$ref} leads nowhere`] : check(target, value, path);
  }
  const faults: string[] = [];
  for (const keyword of ['anyOf', 'oneOf']) {
    const choices = schema[keyword];
    if (Array.isArray(choices) && !choices.some((choice) => check(choice, value, path).length === 0)) {
      faults.push(`${path}: fits none of ${choices.length} forms: ${check(choices[0], value, path).join('; ')}`);
    }
  }
  for (const part of Array.isArray(schema.allOf) ? schema.allOf : []) faults.push(...check(part, value, path));
  const types = schema.type === undefined ? null : [schema.type].flat();
  if (types !== null && !typeOf(value).some((type) => types.includes(type))) {
    return [...faults, `${path}: ${JSON.stringify(value)} is not ${types.join(' or ')}`];
  }
  if (Array.isArray(schema.enum) && !schema.enum.includes(value))
    faults.push(`${path}: ${String(value)} is not in the list`);
  if ('const' in schema && schema.const !== value)
    faults.push(`${path}: ${String(value)} is not ${String(schema.const)}`);
  if (typeof value === 'number') {
    if (typeof schema.minimum === 'number' && value < schema.minimum) faults.push(`${path}: ${value} is too small`);
    if (typeof schema.maximum === 'number' && value > schema.maximum) faults.push(`${path}: ${value} is too large`);
  }
  if (Array.isArray(value)) {
    const fixed = Array.isArray(schema.prefixItems) ? schema.prefixItems : [];
    value.forEach((item, index) => faults.push(...check(fixed[index] ?? schema.items, item, `${path}[${index}]`)));
  }
  if (isObject(value)) {
    const properties = isObject(schema.properties) ? schema.properties : {};
    for (const key of Array.isArray(schema.required) ? (schema.required as string[]) : []) {
      if (!(key in value)) faults.push(`${path}.${key} is missing`);
    }
    for (const [key, part] of Object.entries(value)) {
      if (key in properties) faults.push(...check(properties[key], part, `${path}.${key}`));
      else if (schema.additionalProperties === false) faults.push(`${path}.${key} is not in the schema`);
      else faults.push(...check(schema.additionalProperties, part, `${path}.${key}`));
    }
  }
  return faults;
}
