// The schema that editors get.

import { describe, expect, it } from 'vitest';
import { BAND_FIELDS, LAMINATE_FIELDS } from '../../geometry/brief/fields.ts';
import { briefJsonSchema } from '../../geometry/brief/schema-json.ts';

interface Schema {
  readonly $schema?: string;
  readonly type?: string;
  readonly title?: string;
  readonly description?: string;
  readonly required?: readonly string[];
  readonly additionalProperties?: boolean;
  readonly properties?: Readonly<Record<string, Schema>>;
  readonly anyOf?: readonly Schema[];
  readonly oneOf?: readonly Schema[];
  readonly minimum?: number;
  readonly maximum?: number;
}

describe('briefJsonSchema', () => {
  const schema = briefJsonSchema() as Schema;

  it('is a closed record that demands band and laminate', () => {
    expect(schema.$schema).toBe('https://json-schema.org/draft/2020-12/schema');
    expect(schema.type).toBe('object');
    expect(schema.additionalProperties).toBe(false);
    expect(schema.required).toEqual(['band', 'laminate']);
  });

  it('describes quantities as texts, in the words of the fields', () => {
    const band = schema.properties!.band!;
    expect(band.properties!.low!.type).toBe('string');
    expect(band.properties!.low!.title).toBe(BAND_FIELDS.low.label);
    expect(band.oneOf).toHaveLength(2);
    const record = schema.properties!.laminate!.anyOf!.find(({ type }) => type === 'object')!;
    expect(record.properties!.permittivity).toMatchObject({ type: 'number', minimum: 1, maximum: 30 });
    expect(record.properties!.thickness!.description).toBe(LAMINATE_FIELDS.thickness.help);
    expect(record.required).toEqual(['permittivity', 'lossTangent', 'thickness']);
  });
});
