import { standingCaution } from "../../shared/cautions/standing.ts";
import { bodyLimits } from "../json-body.ts";
import { isWrite, type Operation } from "../openapi/operation.ts";
import { operations } from "../openapi/operations.ts";
import {
  contractSchemas,
  type JsonSchema,
  type NamedSchemas,
  reachable,
  schemaOrReference,
} from "../openapi/schemas.ts";
import { html, type Markup } from "./markup.ts";

/** The API to read: every operation and every shape, made from the same schemas as the OpenAPI document. */
export function docsPage(): string {
  const used = operations.flatMap(({ body, answer }) => [
    body && schemaOrReference(body, "input"),
    "schema" in answer && schemaOrReference(answer.schema, "output"),
  ]);
  const schemas = reachable(contractSchemas(), used);
  return html`<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="color-scheme" content="light dark">
<title>Ebbline: its API</title>
<link rel="icon" href="data:,">
<link rel="stylesheet" href="/api/docs.css">
</head>
<body>
<main>
<h1>Ebbline: its API</h1>
<p class="caution"><strong>Caution.</strong> ${standingCaution.text}</p>
<p>Amounts are in mg, volumes in L, times in elapsed h or as date and time with offset, concentrations in mg/L. Everything is
JSON under <code>/api</code>; unknown fields are refused. A body holds at most ${megabytes(bodyLimits.usual)} MB, a case file
${megabytes(bodyLimits.caseFile)} MB. Refusals are problem documents (RFC 9457) that name each bad field by JSON Pointer.
A write carries an <code>Idempotency-Key</code>: a new UUID, and the same one on a retry.
The same as a document for programs: <a href="/api/openapi.json">OpenAPI 3.1</a>.</p>
<h2>Routes</h2>
${operations.map(operationSection)}
<h2>Shapes</h2>
${shapeSections(schemas)}
</main>
</body>
</html>
`.text;
}

function operationSection(operation: Operation): Markup {
  const { method, path, summary, description, query, body, answer, problems } = operation;
  const fields = [
    ...(query === undefined ? [] : [["Query", Object.keys(query.shape).join(", ")] as const]),
    ...(isWrite(operation) ? [["Header", "Idempotency-Key (UUID)"] as const] : []),
  ];
  return html`<section>
<h3><code>${method.toUpperCase()} /api${path}</code></h3>
<p>${summary}. ${description ?? ""}</p>
<dl>
${fields.map(([name, text]) => html`<dt>${name}</dt><dd>${text}</dd>`)}
${body === undefined ? [] : [html`<dt>Body</dt><dd>${shape(schemaOrReference(body, "input"))}</dd>`]}
<dt>Answer</dt><dd>${answer.status}: ${"schema" in answer ? shape(schemaOrReference(answer.schema, "output")) : answer.mediaType}</dd>
${problems.length === 0 ? [] : [html`<dt>Problems</dt><dd>${problems.join(", ")}</dd>`]}
</dl>
</section>
`;
}

function shapeSections(schemas: NamedSchemas): Markup[] {
  return Object.entries(schemas).map(
    ([name, schema]) => html`<section>
<h3 id="${name}">${name}</h3>
${forms(schema).map((form, index, all) => fieldTable(form, all.length === 1 ? name : `${name}, form ${index + 1}`))}
</section>
`,
  );
}

/** The objects a schema may be: itself, or each of its branches. */
function forms(schema: JsonSchema): JsonSchema[] {
  const branches = (schema["oneOf"] ?? schema["anyOf"]) as JsonSchema[] | undefined;
  return branches === undefined ? [schema] : branches.flatMap(forms);
}

function fieldTable(schema: JsonSchema, name: string): Markup {
  const properties = (schema["properties"] ?? {}) as Record<string, JsonSchema>;
  const required = (schema["required"] ?? []) as string[];
  if (Object.keys(properties).length === 0) return html`<p>${shape(schema)}</p>`;
  return html`<div class="scroll" tabindex="0" role="region" aria-label="Fields of ${name}"><table>
<thead><tr><th scope="col">Field</th><th scope="col">Type</th><th scope="col">Needed</th><th scope="col">What it is</th></tr></thead>
<tbody>
${Object.entries(properties).map(
  ([
    key,
    field,
  ]) => html`<tr><th scope="row"><code>${key}</code></th><td>${shape(field)}</td><td>${required.includes(key) ? "yes" : "no"}</td><td>${about(field)}</td></tr>
`,
)}
</tbody>
</table></div>
`;
}

function shape(schema: JsonSchema): Markup {
  const reference = typeof schema["$ref"] === "string" ? schema["$ref"].split("/").at(-1)! : undefined;
  if (reference !== undefined) return html`<a href="#${reference}">${reference}</a>`;
  if (schema["const"] !== undefined) return html`<code>${JSON.stringify(schema["const"])}</code>`;
  if (Array.isArray(schema["enum"]))
    return html`<code>${schema["enum"].map((value) => JSON.stringify(value)).join(" | ")}</code>`;
  const branches = (schema["oneOf"] ?? schema["anyOf"]) as JsonSchema[] | undefined;
  if (branches !== undefined)
    return html`${branches.map((branch, index) => html`${index === 0 ? "" : " or "}${shape(branch)}`)}`;
  if (schema["type"] === "array") return html`list of ${shape((schema["items"] ?? {}) as JsonSchema)}`;
  return html`${String(schema["type"] ?? "any")}`;
}

function about(field: JsonSchema): string {
  const {
    description,
    minimum,
    maximum,
    default: byDefault,
    maxItems,
    maxLength,
  } = field as Record<string, string | number | undefined>;
  const range =
    typeof minimum === "number" && typeof maximum === "number" && Math.abs(maximum) < Number.MAX_SAFE_INTEGER
      ? `from ${minimum} to ${maximum}`
      : "";
  const most = maxItems ?? maxLength;
  return [
    description ?? "",
    range,
    most === undefined ? "" : `at most ${most}`,
    byDefault === undefined ? "" : `default ${JSON.stringify(byDefault)}`,
  ]
    .filter((part) => part !== "")
    .join("; ");
}

function megabytes(bytes: number): number {
  return bytes / (1024 * 1024);
}
