import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";

/** One dose in its place, or several that are too close together to be told apart. */
export type PlacedMark =
  | { readonly kind: "dose"; readonly dose: ScheduledDose; readonly xPx: number; readonly row: number }
  | { readonly kind: "bunch"; readonly doses: readonly ScheduledDose[]; readonly xPx: number; readonly row: number };

/** Smallest distance of two targets in one row (WCAG 2.2, 2.5.8: 24 by 24 CSS pixels). */
export const markPx = 26;
const mostRows = 3;

/** Doses that are shown by themselves wherever they stand. */
export interface MarksApart {
  /** The dose in hand: it keeps to the first row and the others make no room for it. */
  readonly heldKey?: string | undefined;
  /** The dose that the keyboard is on: it goes into no bunch, or its next step would move nothing. */
  readonly activeKey?: string | undefined;
}

/**
 * Places the doses in view. Doses that stand close together go into up to three rows; where that is not
 * enough they are gathered into bunches, which are told apart by zooming in.
 *
 * @param pixelOf pixels from the plot's left edge, by elapsed hours
 */
export function placeMarks(
  doses: readonly ScheduledDose[],
  pixelOf: (atH: number) => number,
  plotPx: number,
  { heldKey, activeKey }: MarksApart = {},
): PlacedMark[] {
  const inView = doses
    .map((dose) => ({ dose, xPx: pixelOf(dose.atH) }))
    .filter(({ dose, xPx }) => dose.key === heldKey || (xPx >= 0 && xPx <= plotPx))
    .sort((one, other) => one.xPx - other.xPx);
  const held = inView
    .filter(({ dose }) => dose.key === heldKey)
    .map((each): PlacedMark => ({ kind: "dose", ...each, row: 0 }));
  return [
    ...runsOf(inView.filter(({ dose }) => dose.key !== heldKey)).flatMap((run) => placeRun(run, activeKey)),
    ...held,
  ];
}

/** Names a mark as long as it stays what it is. */
export function keyOfMark(mark: PlacedMark): string {
  return mark.kind === "dose" ? mark.dose.key : `bunch ${mark.doses[0]!.key}`;
}

/** Where a mark's element stands. By left and top: a transform for each of some hundred marks makes every frame dearer. */
export function placeOf({ xPx, row }: Pick<PlacedMark, "xPx" | "row">): { left: string; top: string } {
  return { left: `${xPx - markPx / 2}px`, top: `${row * markPx}px` };
}

/** Id of a mark's element: keys hold signs that ids should not. */
export function markId(key: string): string {
  return `mark-${key.replace(/[^A-Za-z0-9]/g, "-")}`;
}

interface Mark {
  readonly dose: ScheduledDose;
  readonly xPx: number;
}

/** Marks each of which touches the next. */
function runsOf(marks: readonly Mark[]): Mark[][] {
  const runs: Mark[][] = [];
  for (const mark of marks) {
    const last = runs.at(-1);
    if (last !== undefined && mark.xPx - last.at(-1)!.xPx < markPx) last.push(mark);
    else runs.push([mark]);
  }
  return runs;
}

function placeRun(run: readonly Mark[], activeKey: string | undefined): PlacedMark[] {
  const placed: PlacedMark[] = [];
  const lastPx: number[] = [];
  for (const mark of run) {
    const row = Array.from({ length: mostRows }, (_, index) => index).find(
      (index) => mark.xPx - (lastPx[index] ?? -Infinity) >= markPx,
    );
    if (row === undefined) return bunched(run, activeKey);
    lastPx[row] = mark.xPx;
    placed.push({ kind: "dose", ...mark, row });
  }
  return placed;
}

/** Cells of one target's width; a cell with one dose shows the dose, a row lower, where it cannot touch its neighbours. */
function bunched(run: readonly Mark[], activeKey: string | undefined): PlacedMark[] {
  const firstPx = run[0]!.xPx;
  const cells = new Map<number, Mark[]>();
  const active = run.filter(({ dose }) => dose.key === activeKey);
  for (const mark of run.filter(({ dose }) => dose.key !== activeKey)) {
    const cell = Math.floor((mark.xPx - firstPx) / markPx);
    cells.set(cell, [...(cells.get(cell) ?? []), mark]);
  }
  const others = [...cells].map(([cell, marks]): PlacedMark => {
    if (marks.length === 1) return { kind: "dose", ...marks[0]!, row: 1 };
    return { kind: "bunch", doses: marks.map(({ dose }) => dose), xPx: firstPx + (cell + 0.5) * markPx, row: 0 };
  });
  // The last row holds nothing else here.
  return [...others, ...active.map((mark): PlacedMark => ({ kind: "dose", ...mark, row: mostRows - 1 }))];
}
