import { formatPercent } from "../../shared/units/format.ts";

/** One piece of the picture, in the order in which the pieces lie. */
export interface PictureSlice {
  readonly key: string;
  readonly label: string;
  /** Written into the piece where it is wide enough. */
  readonly short: string;
  readonly percent: number;
}

const narrowestLabelPercent = 7;

/** The level as one bar, cut into its parts; neighbours differ in tint and are parted by a line. */
export function RemainsPicture({ slices, label }: { slices: readonly PictureSlice[]; label: string }) {
  let begin = 0;
  const placed = slices.map((slice) => {
    const from = begin;
    begin += slice.percent;
    return { ...slice, from };
  });
  return (
    <svg class="remains-picture" width="100%" height="48" role="img" aria-label={label}>
      {placed.map(({ key, label: name, short, percent, from }, index) => (
        <g key={key}>
          <title>{`${name}: ${formatPercent(percent)}`}</title>
          <rect class={`slice slice-${index % 2}`} x={`${from}%`} y="0" width={`${percent}%`} height="48" />
          {percent >= narrowestLabelPercent && (
            <text class="slice-name" x={`${from + percent / 2}%`} y="29" text-anchor="middle">
              {short}
            </text>
          )}
        </g>
      ))}
    </svg>
  );
}
