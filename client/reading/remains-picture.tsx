import { formatPercent } from "../../shared/units/format.ts";

/** One piece of the picture, in the order in which the pieces lie. */
export interface PictureSlice {
  readonly key: string;
  readonly label: string;
  readonly percent: number;
}

const width = 1_000;
const height = 56;
const narrowestLabel = 46;

/** The level as one bar, cut into its parts. Neighbours differ in tint and are parted by a line; the table names them. */
export function RemainsPicture({ slices, label }: { slices: readonly PictureSlice[]; label: string }) {
  let begin = 0;
  const placed = slices.map((slice, index) => {
    const x = begin;
    begin += (slice.percent / 100) * width;
    return { ...slice, index, x, wide: begin - x };
  });
  return (
    <svg
      class="remains-picture"
      viewBox={`0 0 ${width} ${height}`}
      role="img"
      aria-label={label}
      preserveAspectRatio="none"
    >
      {placed.map(({ key, label: name, percent, index, x, wide }) => (
        <g key={key}>
          <title>{`${name}: ${formatPercent(percent)}`}</title>
          <rect class={`slice slice-${index % 3}`} x={x} y="0" width={Math.max(0, wide)} height={height} />
          {wide >= narrowestLabel && <line class="slice-end" x1={x + wide} x2={x + wide} y1="0" y2={height} />}
        </g>
      ))}
    </svg>
  );
}
