/** The part of JSON Schema (draft 2020-12) that the sketch's schema is written in. */
export interface Schema {
  readonly $schema?: string;
  readonly $id?: string;
  readonly title?: string;
  readonly description?: string;
  readonly $ref?: string;
  readonly $defs?: Readonly<Record<string, Schema>>;
  readonly type?: string | readonly string[];
  readonly const?: unknown;
  readonly enum?: readonly unknown[];
  readonly pattern?: string;
  readonly minLength?: number;
  readonly minimum?: number;
  readonly maximum?: number;
  readonly exclusiveMinimum?: number;
  readonly properties?: Readonly<Record<string, Schema>>;
  readonly additionalProperties?: boolean | Schema;
  readonly propertyNames?: Schema;
  readonly required?: readonly string[];
  readonly maxProperties?: number;
  readonly prefixItems?: readonly Schema[];
  readonly items?: Schema;
  readonly minItems?: number;
  readonly maxItems?: number;
  readonly anyOf?: readonly Schema[];
  readonly allOf?: readonly Schema[];
  readonly not?: Schema;
  readonly if?: Schema;
  readonly then?: Schema;
}
