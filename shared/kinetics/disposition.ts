/** How far apart three stated kinetic values may lie and still count as the same statement. */
export const kineticAgreement = 0.005;

const names = ["volumeL", "clearanceLPerH", "eliminationRatePerH", "halfLifeH"] as const;
export type KineticName = (typeof names)[number];

/** All four values of one disposition; `given` names the two that the other two were derived from. */
export interface Kinetics {
  readonly volumeL: number;
  readonly clearanceLPerH: number;
  readonly eliminationRatePerH: number;
  readonly halfLifeH: number;
  readonly given: readonly KineticName[];
}

export type KineticValues = { readonly [name in KineticName]?: number };

export type ResolvedKinetics =
  | { readonly ok: true; readonly kinetics: Kinetics }
  | { readonly ok: false; readonly field: KineticName; readonly problem: string };

/**
 * The full disposition from any two independent values of V, CL, k and half-life.
 *
 *     k = CL / V,   half-life = ln 2 / k
 *
 * The pair used is the first of V and CL, V and k, V and half-life, CL and k, CL and half-life that is
 * given. Further values are accepted where they agree with the derived ones to 0.5 percent (three
 * significant digits, as people write them) and refused with the discrepancy where they do not.
 *
 * Source: Gibaldi and Perrier, Pharmacokinetics, 2nd ed. (1982), ch. 1, from memory.
 */
export function resolveKinetics(values: KineticValues): ResolvedKinetics {
  const { volumeL, clearanceLPerH, eliminationRatePerH, halfLifeH } = values;
  const given = names.filter((name) => values[name] !== undefined);
  const rate = eliminationRatePerH ?? (halfLifeH === undefined ? undefined : Math.LN2 / halfLifeH);
  const rateName: KineticName = eliminationRatePerH === undefined ? "halfLifeH" : "eliminationRatePerH";
  if (volumeL !== undefined && clearanceLPerH !== undefined)
    return agree(values, derive(volumeL, clearanceLPerH / volumeL, ["volumeL", "clearanceLPerH"]));
  if (volumeL !== undefined && rate !== undefined) return agree(values, derive(volumeL, rate, ["volumeL", rateName]));
  if (clearanceLPerH !== undefined && rate !== undefined)
    return agree(values, derive(clearanceLPerH / rate, rate, ["clearanceLPerH", rateName]));
  const field = names.find((name) => !given.includes(name)) ?? "volumeL";
  const missing = "give two independent values of volumeL, clearanceLPerH, eliminationRatePerH and halfLifeH";
  const got = given.length === 0 ? "got none" : `got only ${given.join(" and ")}`;
  return { ok: false, field, problem: `${missing}; ${got}` };
}

function derive(volumeL: number, eliminationRatePerH: number, given: readonly KineticName[]): Kinetics {
  return {
    volumeL,
    eliminationRatePerH,
    clearanceLPerH: volumeL * eliminationRatePerH,
    halfLifeH: Math.LN2 / eliminationRatePerH,
    given,
  };
}

/** Given values keep their own digits: 5 L/h stays 5, not 40 x (5 / 40). */
function agree(values: KineticValues, derived: Kinetics): ResolvedKinetics {
  for (const name of names) {
    const stated = values[name];
    if (stated === undefined || derived.given.includes(name)) continue;
    const apart = Math.abs(stated - derived[name]) / derived[name];
    if (!(apart <= kineticAgreement))
      return {
        ok: false,
        field: name,
        problem: `${stated} disagrees with ${derived.given.join(" and ")}, which give ${Number(derived[name].toPrecision(6))}: ${Number((100 * apart).toPrecision(3))} percent apart`,
      };
  }
  const kept = Object.fromEntries(derived.given.map((name) => [name, values[name]]));
  return { ok: true, kinetics: { ...derived, ...kept } };
}
