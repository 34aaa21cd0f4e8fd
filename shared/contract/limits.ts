/**
 * What the program accepts for each quantity. Outside `hard` a value is refused; outside `usual` it
 * is accepted with a caution that asks for a reason. Schemas, forms and cautions all read this table,
 * so a limit is stated once. The bounds are common practice, no source: they are wide enough for every
 * published drug model in the library and narrow enough to catch a slipped decimal point or unit.
 */
export interface Limit {
  readonly label: string;
  readonly unit: string;
  readonly hard: readonly [min: number, max: number];
  readonly usual: readonly [min: number, max: number];
}

export const limits = {
  volumeL: { label: "Volume of distribution", unit: "L", hard: [0.01, 50_000], usual: [0.2, 2_000] },
  clearanceLPerH: { label: "Clearance", unit: "L/h", hard: [0.00001, 5_000], usual: [0.002, 200] },
  eliminationRatePerH: { label: "Elimination rate constant", unit: "1/h", hard: [0.00007, 70], usual: [0.0005, 7] },
  halfLifeH: { label: "Half-life", unit: "h", hard: [0.01, 9_900], usual: [0.1, 1_400] },
  absorptionRatePerH: { label: "Absorption rate constant", unit: "1/h", hard: [0.001, 200], usual: [0.02, 20] },
  lagH: { label: "Lag before absorption", unit: "h", hard: [0, 48], usual: [0, 6] },
  bioavailability: { label: "Bioavailability F", unit: "", hard: [0.0001, 1], usual: [0.02, 1] },
  saltFactor: { label: "Salt factor S", unit: "", hard: [0.01, 1], usual: [0.3, 1] },
  concentrationMgPerL: { label: "Concentration", unit: "mg/L", hard: [0, 100_000], usual: [0, 1_000] },
  amountMg: { label: "Amount", unit: "mg", hard: [0.000001, 1_000_000], usual: [0.0001, 20_000] },
  durationH: { label: "Infusion duration", unit: "h", hard: [0.001, 8_784], usual: [0.05, 168] },
  rateMgPerH: { label: "Rate", unit: "mg/h", hard: [0, 1_000_000], usual: [0, 20_000] },
  intervalH: { label: "Interval", unit: "h", hard: [0.25, 2_160], usual: [1, 168] },
  addedClearanceLPerH: { label: "Added clearance", unit: "L/h", hard: [0.00001, 5_000], usual: [0.01, 30] },
  changedRatePerH: { label: "Changed elimination rate constant", unit: "1/h", hard: [0, 70], usual: [0.0005, 7] },
  changedClearanceLPerH: { label: "Changed clearance", unit: "L/h", hard: [0, 5_000], usual: [0.002, 200] },
  horizonH: { label: "Length of the plan", unit: "h", hard: [0.1, 17_568], usual: [1, 1_344] },
} as const satisfies Record<string, Limit>;

export type LimitName = keyof typeof limits;

/** F and S where nothing else is stated: all of the amount arrives, and all of it is drug. */
export const wholeAmount = 1;

/** How many of each thing one request or one case may hold. */
export const counts = {
  doses: 10_000,
  eliminationChanges: 1_000,
  pumpSteps: 10_000,
  sampleTimes: 100_000,
  alternatives: 6,
  ordersPerAlternative: 50,
  clockTimesPerOrder: 24,
  exceptionsPerOrder: 1_000,
  recordsPerAlternative: 10_000,
  labelCharacters: 120,
  noteCharacters: 2_000,
} as const;
