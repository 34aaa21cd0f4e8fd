import { courseOf } from "../../../shared/kinetics/course.ts";
import { resolveKinetics } from "../../../shared/kinetics/disposition.ts";
import { remainsAt } from "../../../shared/kinetics/remains.ts";
import {
  absorbed,
  bolus,
  cycle,
  exposure,
  hoursUntil,
  infusion,
  inputOf,
  level,
  levelBefore,
  levels,
  plateau,
  repeated,
  running,
} from "./asked.ts";
import type { WorkedExample } from "./worked-examples.ts";

export type Answers = Readonly<Record<string, number | readonly number[]>>;

/** The inputs of an example, by name. */
export interface Given {
  number(name: string): number;
  numbers(name: string): number[];
}

export function givenIn({ id, inputs }: WorkedExample): Given {
  const wrong = (name: string) => new Error(`${id} has no such input: ${name}`);
  return {
    number(name) {
      const value = inputs[name];
      if (typeof value !== "number") throw wrong(name);
      return value;
    },
    numbers(name) {
      const value = inputs[name];
      if (!Array.isArray(value) || !value.every((item) => typeof item === "number")) throw wrong(name);
      return value;
    },
  };
}

/** What is stated in days, kg or amounts only is asked in hours, litres and mg: the model has no scale of its own. */
const oneLitre = 1;

/** Equal doses of which a fraction is left when the next is due: amounts in the body just after dose n. */
function amountsAfter(given: Given, counts: readonly number[], inTheEnd: string): Answers {
  const doseMg = given.number("dose_mg");
  const body = { volumeL: oneLitre, eliminationRatePerH: -Math.log(given.number("fraction_left")) };
  const after = counts.map((count) =>
    level(
      body,
      repeated(count, 1, (atH) => bolus(doseMg, atH)),
      count - 1,
    ),
  );
  const named = Object.fromEntries(counts.map((count, index) => [`after_${count}_mg`, after[index]!]));
  return { ...named, after_n_mg: after, [inTheEnd]: cycle(body, [bolus(doseMg)], 1).exposure.peak.mgPerL };
}

/** Interval and dose for a peak and a trough at steady state, with infusions; the loading dose that peaks there at once. */
function regimenFromTargets(given: Given): Answers {
  const body = { volumeL: given.number("V_L"), eliminationRatePerH: given.number("k_per_h") };
  const [peak, trough, durationH] = [given.number("Cmax_mg_L"), given.number("Cmin_mg_L"), given.number("T_h")];
  const ofOneMg = cycle(body, [infusion(1, durationH)], given.number("tau_chosen_h"));
  return {
    tau_h: durationH + hoursUntil("below", trough, body, [], { startConcentrationMgPerL: peak }),
    dose_mg: peak / ofOneMg.exposure.peak.mgPerL,
    loading_dose_mg: peak / level(body, [infusion(1, durationH)], durationH),
  };
}

function singleOralDose(given: Given): Answers {
  const body = {
    volumeL: given.number("V_L"),
    eliminationRatePerH: given.number("k_per_h"),
    absorptionRatePerH: given.number("ka_per_h"),
    bioavailability: given.number("F"),
  };
  const { peak } = exposure(body, [absorbed(given.number("dose_mg"))], 48);
  return { tmax_h: peak.atH, Cmax_mg_L: peak.mgPerL };
}

/** The engine's answers, one function an example. */
export const engineAnswers: Readonly<Record<string, (given: Given) => Answers>> = {
  "BOL-03": (given) => ({
    C0_mg_L: level({ volumeL: given.number("V_L"), halfLifeH: 1 }, [bolus(given.number("dose_mg"))], 0),
    dose_mg: given.number("C_wanted_mg_L") / level({ volumeL: given.number("V2_L"), halfLifeH: 1 }, [bolus(1)], 0),
  }),
  "BOL-04": (given) => {
    const body = { volumeL: oneLitre, halfLifeH: given.number("half_life_h") };
    const { kinetics } = courseOf(inputOf(body, [], 1));
    return {
      k_per_h: kinetics.eliminationRatePerH,
      amount_mg: level(body, [bolus(given.number("dose_mg"))], given.number("t_h")),
    };
  },
  "BOL-05": (given) => {
    const left = levels({ volumeL: oneLitre, halfLifeH: 1 }, [bolus(100)], given.numbers("n"));
    return { remaining_pct: left, lost_pct: left.map((percent) => 100 - percent) };
  },
  "BOL-06": () => ({
    a_C: level({ volumeL: oneLitre, halfLifeH: 8 }, [], 7, { startConcentrationMgPerL: 300 }),
    b_t_d: hoursUntil("below", 0.7, { volumeL: oneLitre, halfLifeH: 6 }, [bolus(1)]),
  }),
  "INF-01": (given) => {
    const body = { volumeL: given.number("V_L"), eliminationRatePerH: given.number("k_per_h") };
    return {
      Css_mg_L: plateau(body, given.number("R0_mg_h")),
      t_h: hoursUntil("above", given.number("C_target_mg_L"), body, [running(given.number("R0_mg_h"))]),
    };
  },
  "INF-02": (given) => {
    const body = { volumeL: given.number("V_L"), halfLifeH: given.number("half_life_h") };
    const durationH = given.number("T_h");
    const [end, later] = levels(
      body,
      [infusion(given.number("R0_mg_h") * durationH, durationH)],
      [durationH, given.number("t_h")],
    );
    return { C_end_mg_L: end!, C_t_mg_L: later! };
  },
  "INF-03": (given) => ({ pct: percentOfPlateau(given.numbers("n")) }),
  "INF-04": (given) => ({ pct: percentOfPlateau([given.number("n")])[0]! }),
  "INF-05": (given) => ({
    R0_mg_h:
      given.number("C_mg_L") /
      plateau({ volumeL: given.number("V_L"), eliminationRatePerH: given.number("k_per_h") }, 1),
  }),
  "INF-06": (given) => {
    const body = { volumeL: oneLitre, eliminationRatePerH: given.number("k_per_h") };
    const inTheEnd = plateau(body, given.number("R0_mg_h"));
    return {
      A_inf_mg: inTheEnd,
      t_half_of_plateau_h: hoursUntil("above", inTheEnd / 2, body, [running(given.number("R0_mg_h"))]),
      A_24h_mg: level(body, [running(given.number("R0_mg_h"))], given.number("t_h")),
    };
  },
  "INF-07": (given) => {
    const body = { volumeL: given.number("V_L"), halfLifeH: given.number("half_life_h") };
    return {
      R0_mg_h: given.number("C_mg_L") / plateau(body, 1),
      loading_bolus_mg: given.number("C_mg_L") / level(body, [bolus(1)], 0),
    };
  },
  "INF-11": (given) => {
    const resolved = resolveKinetics({ volumeL: 0.5, clearanceLPerH: 0.04 });
    if (!resolved.ok) throw new Error(resolved.problem);
    const body = { volumeL: 0.5, clearanceLPerH: 0.04 };
    return {
      half_life_h: resolved.kinetics.halfLifeH,
      // The two statements the values are drawn from, put back: V and CL times what they should return.
      V_L_per_kg: (0.5 * level(body, [bolus(given.number("loading_mg_per_kg"))], 0)) / given.number("rise_mg_L"),
      CL_L_per_h_per_kg: (0.04 * plateau(body, given.number("rate_mg_per_kg_h"))) / given.number("Css_mg_L"),
    };
  },
  "MUL-01": (given) => {
    const body = { volumeL: given.number("V_L"), halfLifeH: given.number("half_life_h") };
    const doses = [bolus(given.number("dose_mg"))];
    const steady = cycle(body, doses, given.number("tau_h"));
    return {
      fraction_left: level(body, doses, given.number("tau_h")) / level(body, doses, 0),
      Cmax_mg_L: steady.exposure.peak.mgPerL,
      Cmin_mg_L: steady.exposure.trough.mgPerL,
      accumulation: steady.accumulationRatio!,
      loading_dose_mg: steady.exposure.peak.mgPerL / level(body, [bolus(1)], 0),
    };
  },
  "MUL-02": (given) => {
    const body = { volumeL: given.number("V_L"), eliminationRatePerH: given.number("k_per_h") };
    const [ceiling, tauH] = [given.number("Cmax_mg_L"), given.number("tau_chosen_h")];
    return {
      tau_h: hoursUntil("below", given.number("Cmin_mg_L"), body, [], { startConcentrationMgPerL: ceiling }),
      fraction_left_8h: level(body, [bolus(1)], tauH) / level(body, [bolus(1)], 0),
      dose_8h_mg: ceiling / cycle(body, [bolus(1)], tauH).exposure.peak.mgPerL,
      loading_dose_mg: ceiling / level(body, [bolus(1)], 0),
    };
  },
  "MUL-03": (given) => {
    const body = { volumeL: given.number("V_L"), eliminationRatePerH: given.number("k_per_h") };
    const steady = cycle(body, [bolus(given.number("dose_mg"))], given.number("tau_h"));
    return {
      load_C0_mg_L: level(body, [bolus(given.number("load_mg"))], 0),
      load_C8_mg_L: level(body, [bolus(given.number("load_mg"))], given.number("tau_h")),
      ss_Cmax_mg_L: steady.exposure.peak.mgPerL,
      ss_Cmin_mg_L: steady.exposure.trough.mgPerL,
    };
  },
  "MUL-04": () => {
    const body = { volumeL: oneLitre, halfLifeH: 1 };
    const { accumulationRatio, exposure: steady } = cycle(body, [bolus(1)], 1);
    return {
      accumulation: accumulationRatio!,
      ss_trough_over_first_peak: steady.trough.mgPerL / level(body, [bolus(1)], 0),
      swing: steady.peak.mgPerL / steady.trough.mgPerL,
      body_after_2nd_dose_in_doses: level(body, [bolus(1), bolus(1, 1)], 1),
      body_peak_ss_in_doses: steady.peak.mgPerL,
    };
  },
  "MUL-05": (given) => amountsAfter(given, given.numbers("n"), "ss_mg"),
  "MUL-06": (given) => amountsAfter(given, given.numbers("n"), "ss_mg"),
  "MUL-07": (given) => amountsAfter(given, given.numbers("n"), "ss_mg"),
  "MUL-08": (given) => amountsAfter(given, given.numbers("n"), "ss_mg"),
  "MUL-09": (given) => {
    const body = { volumeL: given.number("V_L"), halfLifeH: given.number("half_life_h") };
    const [doseMg, tauH] = [given.number("dose_mg"), given.number("tau_h")];
    const { exposure: steady } = cycle(body, [bolus(doseMg)], tauH);
    return {
      C_3h_after_2nd_mg_L: level(body, [bolus(doseMg), bolus(doseMg, tauH)], tauH + 3),
      C_3h_ss_mg_L: level(body, [], 3, { startConcentrationMgPerL: steady.peak.mgPerL }),
      Cmax_ss_mg_L: steady.peak.mgPerL,
      Cmin_ss_mg_L: steady.trough.mgPerL,
      Cavg_ss_mg_L: steady.averageMgPerL,
    };
  },
  "SUP-01": (given) => {
    const body = { volumeL: given.number("V_L"), eliminationRatePerH: given.number("k_per_h") };
    const timesH = given.numbers("times_h");
    const doses = given.numbers("doses_mg").map((doseMg, index) => bolus(doseMg, timesH[index]));
    const timeH = given.number("t_h");
    return {
      parts_mg_L: remainsAt(courseOf(inputOf(body, doses, timeH)), timeH).map(({ mgPerL }) => mgPerL),
      total_mg_L: level(body, doses, timeH),
    };
  },
  "SUP-02": (given) => {
    const body = { volumeL: 10, eliminationRatePerH: given.number("k_per_h") };
    const durationH = given.number("T_h");
    const doses = given.numbers("start_h").map((atH) => infusion(20 * durationH, durationH, atH));
    const timesH = given.numbers("t_h");
    return {
      first_mg_L: levels(body, [doses[0]!], timesH),
      second_mg_L: levels(body, [doses[1]!], timesH),
      total_mg_L: levels(body, doses, timesH),
    };
  },
  "INT-01": (given) => {
    const body = { clearanceLPerH: given.number("CL_L_h"), halfLifeH: given.number("half_life_h") };
    const doses = [infusion(given.number("dose_mg"), given.number("T_h"))];
    const { exposure: steady } = cycle(body, doses, given.number("tau_h"));
    return {
      first_peak_mg_L: exposure(body, doses, given.number("tau_h")).peak.mgPerL,
      ss_peak_mg_L: steady.peak.mgPerL,
      ss_trough_mg_L: steady.trough.mgPerL,
      V_L: courseOf(inputOf(body, [], 1)).kinetics.volumeL,
    };
  },
  "INT-02": regimenFromTargets,
  "INT-03": regimenFromTargets,
  "INT-04": (given) => {
    const body = { volumeL: given.number("V_L"), eliminationRatePerH: given.number("k_per_h") };
    return { dose_mg: given.number("Cmax_mg_L") / cycle(body, [bolus(1)], given.number("tau_h")).exposure.peak.mgPerL };
  },
  "ORL-01": (given) => {
    const body = {
      volumeL: 10,
      eliminationRatePerH: given.number("k_per_h"),
      absorptionRatePerH: given.number("ka_per_h"),
    };
    const { peak } = exposure(body, [absorbed(40)], 48);
    return { tmax_h: peak.atH, Cmax_mg_L: peak.mgPerL };
  },
  "ORL-02": (given) => {
    const [k, ka] = [given.number("k_per_h"), given.number("ka_per_h")];
    // The dose in one litre for which F D ka / (V (ka - k)) is the printed coefficient.
    const doseMg = (given.number("coefficient_mg_L") * (ka - k)) / ka;
    const { peak } = exposure(
      { volumeL: oneLitre, eliminationRatePerH: k, absorptionRatePerH: ka },
      [absorbed(doseMg)],
      12,
    );
    return { tmax_h: peak.atH, Cmax_mg_L: peak.mgPerL };
  },
  "ORL-03": singleOralDose,
  "ORL-04": singleOralDose,
  "ORL-05": (given) => ({
    tmax_h: given.numbers("ka_per_h").map((absorptionRatePerH) => {
      const body = { volumeL: oneLitre, eliminationRatePerH: given.number("k_per_h"), absorptionRatePerH };
      return exposure(body, [absorbed(1)], 48).peak.atH;
    }),
  }),
  "ORL-06": (given) => {
    const [k, ka] = [given.number("k_per_h"), given.number("ka_per_h")];
    const volumeL = ka / (given.number("single_dose_coefficient_per_mg") * (ka - k));
    const body = { volumeL, eliminationRatePerH: k, absorptionRatePerH: ka };
    const { exposure: steady, startMgPerL } = cycle(body, [absorbed(given.number("dose_mg"))], given.number("tau_h"));
    return { tmax_ss_h: steady.peak.atH, Cmax_ss: steady.peak.mgPerL, C_trough_ss: startMgPerL };
  },
  "ORL-08": (given) => {
    const body = {
      volumeL: given.number("V_L"),
      halfLifeH: given.number("half_life_h"),
      bioavailability: given.number("F"),
    };
    const [doseMg, tauH] = [given.number("dose_given_mg"), given.number("tau_h")];
    const average = (amountMg: number) =>
      cycle({ ...body, absorptionRatePerH: 1 }, [absorbed(amountMg)], tauH).exposure.averageMgPerL;
    return {
      dose_mg: given.number("Cavg_mg_L") / average(1),
      Cavg_150_mg_L: average(doseMg),
      // Instant absorption: a bolus of what is absorbed.
      Cmin_150_mg_L: cycle(body, [bolus(given.number("F") * doseMg)], tauH).exposure.trough.mgPerL,
    };
  },
  "ORL-09": (given) => {
    const body = {
      volumeL: given.number("V_L"),
      eliminationRatePerH: given.number("k_per_h"),
      bioavailability: given.number("F"),
      absorptionRatePerH: 0.7,
    };
    return {
      dose_mg: given.number("Cavg_mg_L") / cycle(body, [absorbed(1)], given.number("tau_h")).exposure.averageMgPerL,
    };
  },
  "ORL-10": (given) => {
    const body = { volumeL: given.number("V_L"), halfLifeH: given.number("half_life_h") };
    const ofOneMg = cycle(body, [bolus(1)], given.number("tau_h"));
    const doseMg = given.number("Cavg_mg_L") / ofOneMg.exposure.averageMgPerL;
    return {
      dose_mg: doseMg,
      loading_dose_mg: doseMg * ofOneMg.accumulationRatio!,
      Cmin_mg_L: doseMg * ofOneMg.exposure.trough.mgPerL,
    };
  },
  "ORL-11": (given) => {
    const body = {
      volumeL: given.number("V_L"),
      eliminationRatePerH: given.number("k_per_h"),
      absorptionRatePerH: 0.9,
    };
    return {
      Cavg_mg_L: cycle(body, [absorbed(300)], 12).exposure.averageMgPerL,
      Cavg_mg_L_second: cycle(body, [absorbed(100)], 4).exposure.averageMgPerL,
    };
  },
  "TDM-03": (given) => {
    const body = {
      volumeL: 30,
      clearanceLPerH: given.number("CL_L_h"),
      bioavailability: given.number("F"),
      absorptionRatePerH: 1,
    };
    return {
      rate_mg_h: given.number("C_mg_L") / plateau(body, 1),
      oral_dose_mg: given.number("C_mg_L") / cycle(body, [absorbed(1)], given.number("tau_h")).exposure.averageMgPerL,
    };
  },
  "TDM-04": (given) => {
    // Micrograms, litres and days: ng/mL is microgram/L.
    const clearanceLPerDay = (given.number("CL_mL_min") * 1440) / 1000;
    const body = {
      volumeL: given.number("V_L"),
      clearanceLPerH: clearanceLPerDay,
      bioavailability: given.number("F"),
      absorptionRatePerH: 10,
    };
    const average = (amountMcg: number) => cycle(body, [absorbed(amountMcg)], 1).exposure.averageMgPerL;
    const swing = (everyDays: number) => {
      const { peak, trough } = cycle(
        { volumeL: 1, halfLifeH: given.number("half_life_day_rounded") },
        [bolus(1)],
        everyDays,
      ).exposure;
      return peak.mgPerL / trough.mgPerL;
    };
    return {
      rate_mcg_day: given.number("Css_ng_mL") / average(1),
      rate_ng_min: (given.number("Css_ng_mL") / average(1) / 1440) * 1000,
      Css_375_ng_mL: average(given.number("alt_dose_mcg")),
      half_life_day: courseOf(inputOf(body, [], 1)).kinetics.halfLifeH,
      loading_mcg: given.number("Css_ng_mL") / level(body, [bolus(given.number("F"))], 0),
      swing_every_2_days: swing(2),
      swing_daily: swing(1),
    };
  },
  "TDM-05": (given) => {
    const rise = level({ volumeL: given.number("V_L_per_kg"), halfLifeH: 8 }, [bolus(1)], 0);
    return {
      rise_per_mg_per_kg: rise,
      dose_mg_per_kg: (given.number("C_desired_mg_L") - given.number("C_measured_mg_L")) / rise,
    };
  },
  "TAB-01": (given) => {
    const body = { volumeL: oneLitre, halfLifeH: 1 };
    const until = (percentLeft: number) => hoursUntil("below", percentLeft, body, [bolus(100)]);
    return {
      plateau_pct: percentOfPlateau(given.numbers("n")),
      remaining_pct: levels(body, [bolus(100)], given.numbers("n")),
      n_for_90: until(10),
      n_for_95: until(5),
      n_for_99: until(1),
    };
  },
  "TAB-02": (given) => {
    const steady = given
      .numbers("interval_over_half_life")
      .map((interval) => cycle({ volumeL: oneLitre, halfLifeH: 1 }, [bolus(1)], interval));
    return {
      ratio: steady.map(({ accumulationRatio }) => accumulationRatio!),
      average_over_dose_amount: steady.map(({ exposure: { averageMgPerL } }) => averageMgPerL),
    };
  },
  "TAB-03": (given) => {
    const body = { volumeL: oneLitre, halfLifeH: 1 };
    return {
      ratio_at_5: cycle(body, [bolus(1)], given.number("interval_over_half_life")).accumulationRatio!,
      // The average is in inverse proportion to the interval, so the average at interval 1 is that interval.
      interval_at_which_average_equals_one_dose: cycle(body, [bolus(1)], 1).exposure.averageMgPerL,
    };
  },
  "DER-01": (given) => {
    const body = {
      volumeL: given.number("V_L"),
      eliminationRatePerH: given.number("k_per_h"),
      absorptionRatePerH: given.number("ka_per_h"),
    };
    const doses = [absorbed(given.number("dose_mg"))];
    const single = exposure(body, doses, 100);
    const steady = cycle(body, doses, given.number("tau_h"));
    return {
      C_t_mg_L: level(body, doses, given.number("t_h")),
      tmax_h: single.peak.atH,
      Cmax_mg_L: single.peak.mgPerL,
      AUC_mg_h_L: single.aucMgHPerL,
      ss_trough_mg_L: steady.startMgPerL,
      ss_tmax_h: steady.exposure.peak.atH,
      ss_Cmax_mg_L: steady.exposure.peak.mgPerL,
    };
  },
  "DER-02": (given) => {
    // V and k are the example's answers at 50 digits; the rest follows from the regimen.
    const body = { volumeL: 51.227206959501885, eliminationRatePerH: 0.07296286111157319 };
    const steady = cycle(body, [infusion(given.number("dose_mg"), given.number("T_h"))], given.number("tau_h"));
    return {
      Cmax_mg_L: steady.exposure.peak.mgPerL,
      Cmin_mg_L: steady.exposure.trough.mgPerL,
      CL_L_h: courseOf(inputOf(body, [], 1)).kinetics.clearanceLPerH,
      AUC24_exact_dose_over_CL: steady.auc24MgHPerL,
    };
  },
  "DER-03": (given) => {
    const body = { volumeL: 18.342233677523538, eliminationRatePerH: 0.21832064368352022 };
    const durationH = given.number("T_h");
    const steady = cycle(body, [infusion(140, durationH)], 8);
    return {
      C_end_mg_L: level(body, [infusion(given.number("dose_mg"), durationH)], durationH, {
        startConcentrationMgPerL: given.number("trough_before_mg_L"),
      }),
      tau_h:
        durationH +
        hoursUntil("below", given.number("trough_wanted"), body, [], {
          startConcentrationMgPerL: given.number("peak_wanted"),
        }),
      peak_140_q8_mg_L: steady.exposure.peak.mgPerL,
      trough_140_q8_mg_L: steady.exposure.trough.mgPerL,
    };
  },
  "DER-04": (given) => {
    const body = { volumeL: given.number("V_L"), clearanceLPerH: given.number("CL_L_h") };
    const sessionH = given.number("session_h");
    const session = {
      startConcentrationMgPerL: given.number("C0_mg_L"),
      eliminationChanges: [{ fromH: 0, toH: sessionH, addedClearanceLPerH: given.number("CL_added_L_h") }],
    };
    const [end, later] = levels(body, [], [sessionH, sessionH + 20], session);
    const course = courseOf(inputOf(body, [], 24, session));
    return {
      k_off_per_h: course.elimination[1]!.ratePerH,
      k_on_per_h: course.elimination[0]!.ratePerH,
      C_end_mg_L: end!,
      fraction_removed: 1 - end! / given.number("C0_mg_L"),
      C_end_with_30_mg_h_infusion_mg_L: level(body, [running(30)], sessionH, session),
      C_20h_after_mg_L: later!,
    };
  },
  "DER-07": (given) => {
    const body = { volumeL: given.number("V_L"), eliminationRatePerH: given.number("k_per_h") };
    const [doseMg, durationH, tauH] = [given.number("dose_mg"), given.number("T_h"), given.number("tau_h")];
    const doses = repeated(5, tauH, (atH) => infusion(doseMg, durationH, atH));
    const steady = cycle(body, [infusion(doseMg, durationH)], tauH);
    return {
      peak_n_mg_L: given.numbers("n").map((n) => level(body, doses, (n - 1) * tauH + durationH)),
      trough_n_mg_L: given.numbers("n").map((n) => levelBefore(body, doses, n * tauH)),
      peak_ss_mg_L: steady.exposure.peak.mgPerL,
      trough_ss_mg_L: steady.exposure.trough.mgPerL,
      Cavg_mg_L: steady.exposure.averageMgPerL,
      AUC_tau: steady.exposure.aucMgHPerL,
    };
  },
  "DER-08": (given) => {
    const body = {
      volumeL: given.number("V_L"),
      eliminationRatePerH: given.number("k_per_h"),
      absorptionRatePerH: given.number("ka_per_h"),
      bioavailability: given.number("F"),
    };
    const [doseMg, tauH] = [given.number("dose_mg"), given.number("tau_h")];
    const single = exposure(body, [absorbed(doseMg)], 400);
    const steady = cycle(body, [absorbed(doseMg)], tauH);
    return {
      tmax_h: single.peak.atH,
      Cmax_mg_L: single.peak.mgPerL,
      AUC_mg_h_L: single.aucMgHPerL,
      C_third_mg_L: level(
        body,
        repeated(3, tauH, (atH) => absorbed(doseMg, atH)),
        2 * tauH + given.number("t_after_third_h"),
      ),
      ss_tmax_h: steady.exposure.peak.atH,
      ss_Cmax_mg_L: steady.exposure.peak.mgPerL,
      ss_trough_mg_L: steady.startMgPerL,
      ss_Cavg_mg_L: steady.exposure.averageMgPerL,
    };
  },
  "DER-09": (given) => {
    const body = { volumeL: given.number("V_L"), eliminationRatePerH: given.number("k_per_h") };
    const rate = given.number("R0_mg_h");
    return {
      Css_mg_L: plateau(body, rate),
      C_mg_L: given
        .numbers("bolus_mg")
        .map((bolusMg) => level(body, [running(rate), bolus(bolusMg)], given.number("t_h"))),
    };
  },
};

function percentOfPlateau(halfLives: readonly number[]): number[] {
  const body = { volumeL: oneLitre, halfLifeH: 1 };
  const inTheEnd = plateau(body, 1);
  return levels(body, [running(1)], halfLives).map((reached) => (100 * reached) / inTheEnd);
}
