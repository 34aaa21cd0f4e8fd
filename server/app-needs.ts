import type { Logger } from "pino";
import type { Stores } from "../db/stores.ts";
import type { Revision } from "../shared/contract/case.ts";
import type { Instant } from "../shared/contract/schedule.ts";
import type { Calculate } from "./predictions/answer-question.ts";
import type { Appraise } from "./revisions/judge-content.ts";
import type { Settings } from "./settings.ts";

export type Clock = () => Instant;
/** Makes a new UUID each time. */
export type Ids = () => string;
export type WriteSheet = (revision: Revision, options: { readonly paper: "A4" | "Letter" }) => Promise<Uint8Array>;

/** What the server is made from; a test hands in a store in memory and a fixed clock. */
export interface AppNeeds {
  readonly stores: Stores;
  readonly clock: Clock;
  readonly ids: Ids;
  readonly logger: Logger;
  readonly writeSheet: WriteSheet;
  readonly appraise: Appraise;
  readonly calculate: Calculate;
  readonly settings: Pick<Settings, "host" | "publicNames" | "transport" | "requestsPerMinute">;
  /** Called when nothing more can be written safely. */
  readonly giveUp: (why: string) => void;
  /** Where the built page is; without it only the API answers. */
  readonly clientFolder?: string;
}
