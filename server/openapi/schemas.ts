import { z } from "zod";

export type JsonSchema = Readonly<Record<string, unknown>>;

/** Schemas by name, as they stand under components/schemas. */
export type NamedSchemas = Readonly<Record<string, JsonSchema>>;

/**
 * JSON Schema 2020-12 of everything in the contract that has a name. What a request may leave out because
 * it has a default is always there in an answer, so a request has a form of its own, named "...Input".
 */
export function contractSchemas(): NamedSchemas {
  const answers = schemasOf("output", "");
  const requests = schemasOf("input", "Input");
  return Object.fromEntries(
    Object.entries({ ...answers, ...requests }).sort(([one], [other]) => (one < other ? -1 : 1)),
  );
}

/** A reference to a named schema of the contract, or the schema itself where it has no name. */
export function schemaOrReference(schema: z.ZodType, io: "input" | "output"): JsonSchema {
  const id = z.globalRegistry.get(schema)?.id;
  if (id !== undefined) return { $ref: referenceTo(id + (io === "input" ? "Input" : "")) };
  return plain(z.toJSONSchema(schema, { io, reused: "inline" }));
}

/** Only the schemas that a document really refers to. */
export function reachable(all: NamedSchemas, document: unknown): NamedSchemas {
  const wanted = new Set<string>();
  const visit = (value: unknown): void => {
    for (const name of JSON.stringify(value).matchAll(/"#\/components\/schemas\/(\w+)"/g)) {
      if (wanted.has(name[1]!)) continue;
      wanted.add(name[1]!);
      visit(all[name[1]!] ?? {});
    }
  };
  visit(document);
  return Object.fromEntries(Object.entries(all).filter(([name]) => wanted.has(name)));
}

function schemasOf(io: "input" | "output", suffix: string): NamedSchemas {
  const { schemas } = z.toJSONSchema(z.globalRegistry, { io, uri: (id) => referenceTo(id + suffix) });
  return Object.fromEntries(Object.entries(schemas).map(([id, schema]) => [id + suffix, plain(schema)]));
}

function referenceTo(name: string): string {
  return `#/components/schemas/${name}`;
}

/** Without the keywords that place a schema at an address of its own: here it stands inside a document. */
function plain(schema: object): JsonSchema {
  const { $schema: _, $id: __, "~standard": ___, ...rest } = schema as Record<string, unknown>;
  return rest;
}
