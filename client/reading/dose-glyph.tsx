import type { ScheduledDose } from "../../shared/schedule/scheduled-dose.ts";

type GlyphKind = ScheduledDose["give"]["kind"];

const shapes: Record<GlyphKind, string> = {
  bolus: "M3 3 H17 L10 17 Z",
  infusion: "M3 5 H17 V15 H3 Z",
  absorbed: "M10 3 A7 7 0 1 1 9.99 3 Z",
  pump: "M3 17 V11 H8 V4 H13 V9 H17 V17 Z",
};

interface DoseGlyphProps {
  readonly kind: GlyphKind;
  readonly status: ScheduledDose["status"];
}

/** A shape per kind of dose. Given otherwise than planned is hollow, omitted is hollow and crossed, extra has a plus. */
export function DoseGlyph({ kind, status }: DoseGlyphProps) {
  const hollow = status === "changed" || status === "omitted";
  return (
    <svg class="dose-glyph" width="20" height="20" viewBox="0 0 20 20" aria-hidden="true" focusable="false">
      <path
        d={shapes[kind]}
        fill={hollow ? "none" : "currentColor"}
        stroke="currentColor"
        stroke-width="2"
        stroke-linejoin="round"
      />
      {status === "omitted" && <path d="M3 3 L17 17 M17 3 L3 17" stroke="currentColor" stroke-width="2" />}
      {status === "extra" && <path class="glyph-plus" d="M10 6.5 V13.5 M6.5 10 H13.5" stroke-width="2" />}
      {status === "as-planned" && (
        <path class="glyph-plus" d="M6.5 10 L9 12.5 L13.5 7.5" fill="none" stroke-width="2" />
      )}
    </svg>
  );
}
