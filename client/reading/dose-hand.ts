import { batch, type ReadonlySignal, signal } from "@preact/signals";
import type { RegimenContent, Schedule } from "../../shared/contract/case.ts";
import { DomainError } from "../../shared/errors.ts";
import { instantAt, sayClock } from "../../shared/schedule/clock.ts";
import { spanOf } from "../../shared/schedule/expand-orders.ts";
import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";
import { letterOf, withSchedule } from "../case/case-document.ts";
import type { CaseModel } from "../case/case-model.ts";
import { newId } from "../case/new-id.ts";
import { type DoseChange, editDose, removeDose } from "./dose-edits.ts";
import { nameOfDose } from "./dose-words.ts";
import { sayRefusal } from "./predictions.ts";
import { withinPlan } from "./snap.ts";

/** How long the hand must rest before the page around the curve follows: sooner, each figure would cost a frame. */
const restMs = 150;

/** A dose while it is being dragged, and the schedule it would make. */
export interface Held {
  readonly key: string;
  readonly doseKey: string;
  readonly schedule: Schedule;
  readonly atH: number;
}

/** The hand that moves doses. What it does is one undo step, however far it goes. */
export interface DoseHand {
  readonly held: ReadonlySignal<Held | undefined>;
  /** What the newest move, edit or refusal was, for the line below the ruler. */
  readonly said: ReadonlySignal<string>;
  take(key: string, dose: ScheduledDose): void;
  moveTo(atH: number): void;
  drop(): void;
  /** Puts the dose back where it was taken. */
  putBack(): void;
  /** Changes a dose at once; with the same `merge` text, consecutive changes are one undo step. */
  edit(key: string, dose: ScheduledDose, change: DoseChange, merge?: string): void;
  remove(key: string, dose: ScheduledDose): void;
}

interface Grip {
  readonly key: string;
  readonly dose: ScheduledDose;
  readonly content: RegimenContent;
  readonly merge: string;
  written: boolean;
}

export function createDoseHand(model: CaseModel): DoseHand {
  const held = signal<Held | undefined>(undefined);
  const said = signal("");
  let grip: Grip | undefined;
  let resting: ReturnType<typeof setTimeout> | undefined;
  let why = "";

  const write = (key: string, content: RegimenContent, what: string, schedule: Schedule, merge?: string) => {
    const sentence = `${what} of alternative ${letterOf(model.document.peek(), key)}${why && `. ${why}`}`;
    said.value = sentence;
    if (schedule !== content.schedule)
      model.change(sentence, (document) => withSchedule(document, key, () => schedule), merge);
  };
  const writeHeld = () => {
    const now = held.peek();
    if (grip === undefined || now === undefined) return;
    grip.written = true;
    write(grip.key, grip.content, sayMoved(grip.dose, now.atH, grip.content), now.schedule, grip.merge);
  };
  const release = () => {
    clearTimeout(resting);
    held.value = undefined;
    grip = undefined;
    why = "";
  };
  /** A refused change leaves everything as it was and says why. */
  const attempt = (edit: () => void) => {
    try {
      edit();
    } catch (error) {
      if (!(error instanceof DomainError)) throw error;
      said.value = `Not done: ${sayRefusal(error)}`;
    }
  };
  return {
    held,
    said,
    take(key, dose) {
      const content = model.contents.peek().get(key);
      if (content !== undefined) grip = { key, dose, content, merge: `dose moved ${newId()}`, written: false };
    },
    moveTo(toH) {
      const taken = grip;
      if (taken === undefined) return;
      attempt(() => {
        const { content, dose, key } = taken;
        const clamped = withinPlan(toH, spanOf(content));
        why = clamped.why ?? "";
        if (clamped.atH === held.peek()?.atH) return;
        const at = instantAt(content.setting.plan.start, clamped.atH, content.timeZone);
        const schedule = editDose(content.schedule, dose, { at }, spanOf(content));
        held.value = { key, doseKey: dose.key, schedule, atH: clamped.atH };
        clearTimeout(resting);
        resting = setTimeout(writeHeld, restMs);
      });
    },
    drop() {
      batch(() => {
        writeHeld();
        release();
      });
    },
    putBack() {
      batch(() => {
        if (grip?.written) model.undo();
        said.value = "Put back";
        release();
      });
    },
    edit(key, dose, change, merge) {
      const content = model.contents.peek().get(key);
      if (content === undefined) return;
      attempt(() => {
        const wanted = change.at ?? dose.at;
        const clamped = withinPlan(
          (Date.parse(wanted) - Date.parse(content.setting.plan.start)) / 3_600_000,
          spanOf(content),
        );
        why = clamped.why ?? "";
        const at =
          clamped.why === undefined ? wanted : instantAt(content.setting.plan.start, clamped.atH, content.timeZone);
        const schedule = editDose(content.schedule, dose, { ...change, at }, spanOf(content));
        const moved = change.amountMg === undefined && change.durationH === undefined;
        const what = moved
          ? sayMoved(dose, clamped.atH, content)
          : `${capital(nameOfDose(dose, content.schedule))} changed`;
        write(key, content, what, schedule, merge);
        why = "";
      });
    },
    remove(key, dose) {
      const content = model.contents.peek().get(key);
      if (content === undefined) return;
      attempt(() => {
        const schedule = removeDose(content.schedule, dose);
        const name = capital(nameOfDose(dose, content.schedule));
        if (schedule === content.schedule)
          said.value = `${name} is recorded as omitted already; its record is under the doses given`;
        else
          write(
            key,
            content,
            dose.status === "as-planned" || dose.status === "changed"
              ? `${name} recorded as omitted`
              : `${name} deleted`,
            schedule,
          );
      });
    },
  };
}

function sayMoved(dose: ScheduledDose, atH: number, content: RegimenContent): string {
  const at = instantAt(content.setting.plan.start, atH, content.timeZone);
  return `${capital(nameOfDose(dose, content.schedule))} moved to ${sayClock(at, content.timeZone)}`;
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
