import { z } from "zod";
import {
  CaseAnswer,
  CaseList,
  RegimenList,
  RevisionAnswer,
  RevisionList,
  WholeCase,
} from "../../shared/contract/answers.ts";
import {
  CaseChange,
  CaseDraft,
  CaseFile,
  Regimen,
  RegimenChange,
  RegimenDraft,
  RevisionDraft,
} from "../../shared/contract/case.ts";
import { PredictionRequest, PredictionResponse } from "../../shared/contract/prediction.ts";
import { SteadyStateRequest, SteadyStateResponse } from "../../shared/contract/steady-state.ts";
import { CaseListQuery } from "../routes/case-routes.ts";
import { SheetQuery } from "../routes/revision-routes.ts";
import { Health } from "./answers.ts";
import type { Operation } from "./operation.ts";

const ok = (description: string, schema: z.ZodType) => ({ status: 200, description, schema }) as const;
const made = (description: string, schema: z.ZodType) => ({ status: 201, description, schema }) as const;
const file = (description: string, mediaType: string) => ({ status: 200, description, mediaType }) as const;

/** Every route under /api. A test holds it against the routes that are really there. */
export const operations: readonly Operation[] = [
  {
    method: "post",
    path: "/predictions",
    summary: "Predict concentrations of a course of doses",
    description:
      "Keeps nothing. Concentrations in mg/L at the times asked for, exposure over a window, and what remains of each dose at one time.",
    body: PredictionRequest,
    answer: ok("Concentrations, exposure and cautions", PredictionResponse),
    problems: [413, 415, 422],
  },
  {
    method: "post",
    path: "/steady-states",
    summary: "Exact steady state of a repeating cycle",
    description: "Keeps nothing. The cycle is solved, not simulated.",
    body: SteadyStateRequest,
    answer: ok("Metrics of one cycle at steady state and cautions", SteadyStateResponse),
    problems: [413, 415, 422],
  },
  {
    method: "get",
    path: "/cases",
    summary: "List cases, newest change first",
    query: CaseListQuery,
    answer: ok("Cases", CaseList),
    problems: [422],
  },
  {
    method: "post",
    path: "/cases",
    summary: "Make a case",
    description: "Enter no names and no identifiers.",
    body: CaseDraft,
    answer: made("The case", CaseAnswer),
    problems: [413, 415, 422],
  },
  {
    method: "get",
    path: "/cases/{caseId}",
    summary: "A case with its alternatives and the newest revision of each",
    answer: ok("The case", WholeCase),
    problems: [404],
  },
  {
    method: "patch",
    path: "/cases/{caseId}",
    summary: "Change or archive a case",
    description: "Names the version it was made from; 409 if somebody saved in between.",
    body: CaseChange,
    answer: ok("The case as it is now", CaseAnswer),
    problems: [404, 409, 413, 415, 422],
  },
  {
    method: "get",
    path: "/cases/{caseId}/file",
    summary: "Download a case as a file",
    description: "Everything that was entered and saved, with the hash of each revision.",
    answer: ok("The case file, version 1", CaseFile),
    problems: [404],
  },
  {
    method: "post",
    path: "/case-files",
    summary: "Upload a case file as a new case",
    description:
      "At most 20 MB. Every hash is checked and every second opinion computed again; all of it is taken in or nothing.",
    body: CaseFile,
    answer: made("The new case", CaseAnswer),
    problems: [413, 415, 422],
  },
  {
    method: "get",
    path: "/cases/{caseId}/regimens",
    summary: "List the alternatives of a case",
    answer: ok("Alternatives, retired ones too", RegimenList),
    problems: [404],
  },
  {
    method: "post",
    path: "/cases/{caseId}/regimens",
    summary: "Add an alternative to a case",
    description: "At most 6 that are not retired.",
    body: RegimenDraft,
    answer: made("The alternative", Regimen),
    problems: [404, 413, 415, 422],
  },
  {
    method: "patch",
    path: "/cases/{caseId}/regimens/{regimenId}",
    summary: "Rename or retire an alternative",
    body: RegimenChange,
    answer: ok("The alternative as it is now", Regimen),
    problems: [404, 413, 415, 422],
  },
  {
    method: "get",
    path: "/cases/{caseId}/regimens/{regimenId}/revisions",
    summary: "List the revisions of an alternative, newest first",
    answer: ok("Revisions", RevisionList),
    problems: [404],
  },
  {
    method: "post",
    path: "/cases/{caseId}/regimens/{regimenId}/revisions",
    summary: "Save a revision",
    description:
      "Immutable and numbered. 409 if it is based on an older one than the newest; 422 if a caution that stops has no reason, or if two independent calculations do not agree.",
    body: RevisionDraft,
    answer: made("The revision with its number, hash, second opinion and cautions", RevisionAnswer),
    problems: [404, 409, 413, 415, 422],
  },
  {
    method: "get",
    path: "/revisions/{revisionId}",
    summary: "One revision",
    answer: ok("The revision", RevisionAnswer),
    problems: [404],
  },
  {
    method: "get",
    path: "/revisions/{revisionId}/sheet.pdf",
    summary: "The sheet of a revision",
    description: "Made to be checked by hand. The same revision and paper give the same bytes.",
    query: SheetQuery,
    answer: file("A tagged PDF", "application/pdf"),
    problems: [404, 422],
  },
  { method: "get", path: "/health", summary: "Whether the server lives", answer: ok("It does", Health), problems: [] },
  {
    method: "get",
    path: "/ready",
    summary: "Whether its database is open and whole",
    answer: ok("It is", Health),
    problems: [503],
  },
  {
    method: "get",
    path: "/openapi.json",
    summary: "This description as OpenAPI 3.1",
    answer: ok("OpenAPI document", z.looseObject({ openapi: z.string() })),
    problems: [],
  },
  {
    method: "get",
    path: "/docs",
    summary: "This description as a readable page",
    answer: file("A page", "text/html"),
    problems: [],
  },
  {
    method: "get",
    path: "/docs.css",
    summary: "The style of that page",
    answer: file("A style sheet", "text/css"),
    problems: [],
  },
];
