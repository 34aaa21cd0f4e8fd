import { batch, computed, type ReadonlySignal, signal } from "@preact/signals";
import type { RegimenContent, Schedule } from "../../shared/contract/case.ts";
import { DomainError } from "../../shared/errors.ts";
import { hoursBetween, instantAt, sayClock } from "../../shared/schedule/clock.ts";
import { spanOf } from "../../shared/schedule/expand-orders.ts";
import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";
import { letterOf, withSchedule } from "../case/case-document.ts";
import type { CaseModel } from "../case/case-model.ts";
import { newId } from "../case/new-id.ts";
import { sayRefusal } from "../case/say-refusal.ts";
import { announce } from "../shell/announce.ts";
import { afterPaint } from "./after-paint.ts";
import { type DoseChange, editDose, removeDose } from "./dose-edits.ts";
import { capital, nameOfDose } from "./dose-words.ts";
import { type Moved, movedPrediction } from "./moved-prediction.ts";
import { predictionOf, rememberPrediction } from "./predictions.ts";
import { type Clamped, withinPlan } from "./snap.ts";

/** How long the hand must rest before the page around the curve follows: sooner, each figure would cost a frame. */
const restMs = 150;

/** A dose in the hand, and the content as it would be if it were dropped here. */
export interface Held extends Moved {
  readonly key: string;
  readonly content: RegimenContent;
}

/** The hand that moves doses. From taking to dropping is one undo step, however far it goes. */
export interface DoseHand {
  readonly held: ReadonlySignal<Held | undefined>;
  /** A dose as it stands in the hand; undefined for one that is not in it. */
  inHand(doseKey: string): ScheduledDose | undefined;
  /** Why the newest move or edit was refused or cut short; it is over as soon as the document changes. */
  readonly objection: ReadonlySignal<string>;
  take(key: string, dose: ScheduledDose): void;
  moveTo(atH: number): void;
  drop(): void;
  /** Drops it once the curve has been painted: writing it down takes longer than a frame has. */
  letGo(): void;
  /** Puts the dose back where it was taken. */
  putBack(): void;
  /** Changes a dose at once. */
  edit(key: string, dose: ScheduledDose, change: DoseChange): void;
  remove(key: string, dose: ScheduledDose): void;
}

interface Grip {
  readonly key: string;
  readonly dose: ScheduledDose;
  readonly content: RegimenContent;
  readonly merge: string;
  why?: string | undefined;
  written?: Held;
}

export function createDoseHand(model: CaseModel): DoseHand {
  const held = signal<Held | undefined>(undefined);
  const said = signal({ text: "", about: model.document.peek() });
  const object = (text: string) => {
    said.value = { text, about: model.document.peek() };
    if (text !== "") announce(text);
  };
  let grip: Grip | undefined;
  let resting: ReturnType<typeof setTimeout> | undefined;

  /** A refused change leaves everything as it was and says why. */
  const attempt = (edit: () => void) => {
    try {
      edit();
    } catch (error) {
      if (!(error instanceof DomainError)) throw error;
      object(`Not done: ${sayRefusal(error, model.document.peek().timeZone)}`);
    }
  };
  const write = (key: string, what: string, schedule: Schedule, merge?: string) =>
    model.change(what, (document) => withSchedule(document, key, () => schedule), merge);
  const writeHeld = () => {
    const now = held.peek();
    if (grip === undefined || now === undefined || grip.written === now) return;
    const { key, dose, content, merge, why } = grip;
    grip.written = now;
    attempt(() => {
      const schedule = editDose(content.schedule, dose, { at: now.at }, spanOf(content));
      write(key, sentence(model, key, sayMoved(dose, now.at, content), why), schedule, merge);
    });
  };
  const release = () => {
    clearTimeout(resting);
    held.value = undefined;
    grip = undefined;
  };
  const drop = () =>
    batch(() => {
      writeHeld();
      release();
    });
  return {
    held,
    inHand(doseKey) {
      if (held.value?.doseKey !== doseKey) return undefined;
      const prediction = predictionOf(held.value.content);
      return prediction.ok ? prediction.doses.find(({ key }) => key === doseKey) : undefined;
    },
    objection: computed(() => (said.value.about === model.document.value ? said.value.text : "")),
    take(key, dose) {
      drop();
      const content = model.contents.peek().get(key);
      if (content === undefined) return;
      attempt(() => {
        // What may not be moved is refused here, not on the way.
        editDose(content.schedule, dose, { at: dose.at }, spanOf(content));
        grip = { key, dose, content, merge: `dose moved ${newId()}` };
      });
    },
    moveTo(toH) {
      if (grip === undefined) return;
      const { content, dose, key } = grip;
      const { atH, why } = withinPlan(toH, spanOf(content));
      grip.why = why;
      object(why ?? "");
      if (atH === (held.peek()?.atH ?? dose.atH)) return;
      const at = instantAt(content.setting.plan.start, atH, content.timeZone);
      const moved = { doseKey: dose.key, at, atH };
      const preview = { ...content };
      rememberPrediction(preview, movedPrediction(predictionOf(content), moved));
      held.value = { key, content: preview, ...moved };
      clearTimeout(resting);
      resting = setTimeout(writeHeld, restMs);
    },
    drop,
    letGo() {
      const mine = grip;
      afterPaint(() => {
        if (grip === mine) drop();
      });
    },
    putBack() {
      batch(() => {
        if (grip?.written) model.undo();
        release();
        object("Put back where it was");
      });
    },
    edit(key, dose, change) {
      const content = model.contents.peek().get(key);
      if (content === undefined) return;
      attempt(() => {
        const { at, why } = instantWithin(change.at ?? dose.at, content);
        const schedule = editDose(content.schedule, dose, { ...change, at }, spanOf(content));
        write(key, sentence(model, key, `${nameOfDose(dose, content.schedule)} changed`, why), schedule);
      });
    },
    remove(key, dose) {
      const content = model.contents.peek().get(key);
      if (content === undefined) return;
      const name = nameOfDose(dose, content.schedule);
      if (dose.status === "omitted") {
        object(`${capital(name)} is recorded as omitted already; its record is under the doses given`);
        return;
      }
      const recorded = dose.status === "as-planned" || dose.status === "changed";
      attempt(() => {
        const what = `${name} ${recorded ? "recorded as omitted" : "deleted"}`;
        write(key, sentence(model, key, what, undefined), removeDose(content.schedule, dose));
      });
    },
  };
}

function instantWithin(wanted: string, { setting, timeZone }: RegimenContent): Pick<Clamped, "why"> & { at: string } {
  const { start } = setting.plan;
  const { atH, why } = withinPlan(hoursBetween(start, wanted), {
    ...setting.plan,
    timeZone,
  });
  return why === undefined ? { at: wanted } : { at: instantAt(start, atH, timeZone), why };
}

function sentence(model: CaseModel, key: string, what: string, why: string | undefined): string {
  return `Alternative ${letterOf(model.document.peek(), key)}: ${what}${why === undefined ? "" : `. ${why}`}`;
}

function sayMoved(dose: ScheduledDose, at: string, { schedule, timeZone }: RegimenContent): string {
  return `${nameOfDose(dose, schedule)} moved to ${sayClock(at, timeZone)}`;
}
