import { DoseGlyph } from "./dose-glyph.tsx";

/** What the shapes on the ruler mean, and how to work it without a pointer. */
export function RulerKey() {
  return (
    <div class="ruler-key">
      <ul class="glyph-list">
        <li>
          <DoseGlyph kind="bolus" status="planned" /> bolus
        </li>
        <li>
          <DoseGlyph kind="infusion" status="planned" /> infusion
        </li>
        <li>
          <DoseGlyph kind="absorbed" status="planned" /> absorbed
        </li>
        <li>
          <DoseGlyph kind="pump" status="planned" /> pump log
        </li>
        <li>
          <DoseGlyph kind="infusion" status="as-planned" /> given as planned
        </li>
        <li>
          <DoseGlyph kind="infusion" status="changed" /> given otherwise
        </li>
        <li>
          <DoseGlyph kind="infusion" status="omitted" /> omitted
        </li>
        <li>
          <DoseGlyph kind="infusion" status="extra" /> extra
        </li>
      </ul>
      <details>
        <summary>Keys and pointer</summary>
        <p id="ruler-keys">
          On the ruler: Left and Right move the dose by one step, with Shift by four; Up and Down go to the dose before
          or after; Enter opens it for typing; Delete removes it. By pointer: drag a dose, with Alt held to move it
          freely to the minute; Escape puts it back.
        </p>
        <p id="curve-keys">
          On the curve: Left and Right move the cursor by one step, with Shift by four; Page Up and Page Down by a day;
          Home and End go to the ends of the plan; plus and minus zoom, 0 shows the whole plan. By pointer: press or
          drag on the curve to set the cursor, drag the clock times to move along, turn the wheel with Ctrl held to
          zoom.
        </p>
      </details>
    </div>
  );
}
