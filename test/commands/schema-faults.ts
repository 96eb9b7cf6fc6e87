/**
 * A validator for the keywords of JSON Schema (draft 2020-12, from memory) that the schema of studies
 * uses. It throws on any other keyword, so that none is passed over in silence.
 */
export interface Schema {
  readonly [keyword: string]: unknown;
}

const withoutMeaning = new Set(['$schema', '$id', 'title', 'description', 'examples', 'default', '$defs']);

const typeOf = (value: unknown) => {
  if (value === null) return 'null';
  if (Array.isArray(value)) return 'array';
  return typeof value;
};

const isMap = (value: unknown): value is Record<string, unknown> => typeOf(value) === 'object';

type Check = (rule: unknown, value: unknown, place: string, schema: Schema) => string[];

const checks: Readonly<Record<string, Check>> = {
  type: (rule, value, place) => {
    const wanted = [rule].flat();
    return wanted.includes(typeOf(value)) ? [] : [`${place}: not a ${wanted.join(' or ')}`];
  },
  enum: (rule, value, place) =>
    (rule as unknown[]).includes(value) ? [] : [`${place}: not one of those offered`],
  const: (rule, value, place) => (rule === value ? [] : [`${place}: not ${rule}`]),
  anyOf: (rule, value, place) => {
    const faults = (rule as Schema[]).map((choice) => schemaFaults(choice, value, place));
    return faults.some(({ length }) => length === 0) ? [] : [`${place}: none of the forms fits`];
  },
  required: (rule, value, place) =>
    (rule as string[])
      .filter((key) => isMap(value) && !(key in value))
      .map((key) => `${place}: ${key} is missing`),
  properties: (rule, value, place) =>
    Object.entries(rule as Record<string, Schema>).flatMap(([key, inner]) =>
      isMap(value) && key in value ? schemaFaults(inner, value[key], `${place}.${key}`) : [],
    ),
  additionalProperties: (rule, value, place, { properties = {} }) => {
    const others = Object.keys(isMap(value) ? value : {}).filter((key) => !(key in (properties as object)));
    if (rule === false) return others.map((key) => `${place}: ${key} is not known`);
    return others.flatMap((key) =>
      schemaFaults(rule as Schema, (value as Record<string, unknown>)[key], `${place}.${key}`),
    );
  },
  propertyNames: (rule, value, place) =>
    Object.keys(isMap(value) ? value : {}).flatMap((key) => schemaFaults(rule as Schema, key, place)),
  items: (rule, value, place) =>
    Array.isArray(value)
      ? value.flatMap((entry, i) => schemaFaults(rule as Schema, entry, `${place}[${i}]`))
      : [],
};

/** Where and why a value does not fit a schema; nothing when it does. */
export function schemaFaults(schema: Schema, value: unknown, place = '$'): string[] {
  return Object.entries(schema).flatMap(([keyword, rule]) => {
    if (withoutMeaning.has(keyword)) return [];
    const check = checks[keyword];
    if (check === undefined)
      throw new Error(`the schema uses ${keyword}, which this validator does not know`);
    return check(rule, value, place, schema);
  });
}
