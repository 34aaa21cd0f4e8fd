import type { z } from "zod";
import { standingCaution } from "../../shared/cautions/standing.ts";
import { Problem } from "../../shared/contract/problem.ts";
import { isWrite, type Operation } from "./operation.ts";
import { operations } from "./operations.ts";
import { contractSchemas, type JsonSchema, reachable, schemaOrReference } from "./schemas.ts";

/** What every operation may answer, whatever is asked: no such host or page, too often, or our own fault. */
const always = [400, 403, 421, 429, 500] as const;

const statusNames: Readonly<Record<number, string>> = {
  400: "The request cannot be read",
  403: "Another site may not write here",
  404: "Not here",
  409: "Somebody saved in between",
  413: "The body is too large",
  415: "The body must be JSON",
  421: "The request was meant for another server",
  422: "Some values are not usable; each is named",
  429: "Too many requests",
  500: "Something went wrong in the server",
  503: "The server cannot answer now",
};

/** The API as an OpenAPI 3.1 document, made from the schemas that requests are really read with. */
export function openApiDocument(): JsonSchema {
  const paths: Record<string, Record<string, unknown>> = {};
  for (const operation of operations)
    paths[operation.path] = { ...paths[operation.path], [operation.method]: describe(operation) };
  return {
    openapi: "3.1.0",
    jsonSchemaDialect: "https://json-schema.org/draft/2020-12/schema",
    info: {
      title: "Ebbline",
      version: "1",
      description: `Plans dosing regimens for drugs that follow one compartment with first-order elimination. Amounts in mg, volumes in L, times in h, concentrations in mg/L. ${standingCaution.text}`,
    },
    servers: [{ url: "/api" }],
    paths,
    components: { schemas: reachable(contractSchemas(), paths) },
  };
}

function describe(operation: Operation): JsonSchema {
  const { summary, description, body, answer, problems } = operation;
  const statuses = [...always, ...problems].sort((one, other) => one - other);
  return {
    summary,
    operationId: operationId(operation),
    ...(description !== undefined && { description }),
    parameters: parametersOf(operation),
    ...(body !== undefined && {
      requestBody: { required: true, content: { "application/json": { schema: schemaOrReference(body, "input") } } },
    }),
    responses: {
      [answer.status]: { description: answer.description, content: contentOf(answer) },
      ...Object.fromEntries(
        statuses.map((status) => [
          status,
          {
            description: statusNames[status],
            content: { "application/problem+json": { schema: schemaOrReference(Problem, "output") } },
          },
        ]),
      ),
    },
  };
}

function contentOf(answer: Operation["answer"]): JsonSchema {
  if ("schema" in answer) return { "application/json": { schema: schemaOrReference(answer.schema, "output") } };
  return { [answer.mediaType]: { schema: { type: "string" } } };
}

function parametersOf(operation: Operation): JsonSchema[] {
  const inPath = [...operation.path.matchAll(/\{(\w+)\}/g)].map(([, name]) => ({
    name,
    in: "path",
    required: true,
    schema: { type: "string", format: "uuid" },
  }));
  const inQuery = Object.entries(operation.query?.shape ?? {}).map(([name, schema]) => ({
    name,
    in: "query",
    required: false,
    schema: schemaOrReference(schema as z.ZodType, "input"),
  }));
  const key = {
    name: "Idempotency-Key",
    in: "header",
    required: true,
    description:
      "A new UUID for each write and the same one for each retry of it: a retry answers what the first try answered.",
    schema: { type: "string", format: "uuid" },
  };
  return [...inPath, ...inQuery, ...(isWrite(operation) ? [key] : [])];
}

function operationId({ method, path }: Operation): string {
  return method + path.replaceAll(/[^A-Za-z]+(\w)/g, (_, letter: string) => letter.toUpperCase()).replaceAll(/\W/g, "");
}
