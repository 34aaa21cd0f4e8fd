import { requestsPerSecond } from "./load.mjs";
import { serverGroup } from "./started-server.mjs";
import { line } from "./timing.mjs";

/** A plan of three days, looked at every six minutes: 721 levels. */
const asked = JSON.stringify({
  parameters: { volumeL: 35, clearanceLPerH: 4.2, absorptionRatePerH: 1.1 },
  eliminationChanges: [{ fromH: 36, toH: 40, addedClearanceLPerH: 3.5 }],
  doses: [
    { kind: "bolus", atH: 0, amountMg: 500 },
    ...Array.from({ length: 5 }, (_, index) => ({
      kind: "infusion",
      atH: 12 * (index + 1),
      amountMg: 400,
      durationH: 1,
    })),
    { kind: "absorbed", atH: 30, amountMg: 250, lagH: 0.25 },
  ],
  horizonH: 72,
  sampleEveryH: 0.1,
  rangeMgPerL: { low: 5, high: 15 },
});

/** POST /api/predictions of the whole server, against an empty Express route that answers as many bytes. */
export async function httpBenchmarks({ rounds = 4, seconds = 2 } = {}) {
  const servers = serverGroup();
  try {
    const ours = await servers.whole();
    const bytes = await answerBytes(ours);
    const empty = await servers.empty(bytes);
    const best = { ours: { perSecond: 0 }, empty: { perSecond: 0 } };
    await requestsPerSecond(ours, asked, { seconds: 1 });
    await requestsPerSecond(empty, asked, { seconds: 1 });
    for (let round = 0; round < rounds; round++) {
      best.ours = better(best.ours, await requestsPerSecond(ours, asked, { seconds }));
      best.empty = better(best.empty, await requestsPerSecond(empty, asked, { seconds }));
    }
    const busy = (share) => `${Math.round(100 * share)} percent`;
    return [
      line("POST /api/predictions (72 h, 0.1 h), against an empty Express route of as many bytes", {
        ours: best.ours.perSecond,
        theirs: best.empty.perSecond,
        unit: "requests per second",
        ratio: best.ours.perSecond / best.empty.perSecond,
        target: { atLeast: 0.5 },
        note: `${bytes} bytes; the asking process was at work ${busy(best.ours.busy)} of the time with ours, ${busy(best.empty.busy)} with the empty route`,
      }),
    ];
  } finally {
    await servers.end();
  }
}

const better = (one, other) => (other.perSecond > one.perSecond ? other : one);

/** Bytes of our answer, which must be the prediction asked for. */
async function answerBytes(address) {
  const response = await fetch(`${address}/api/predictions`, {
    method: "POST",
    headers: { "Content-Type": "application/json" },
    body: asked,
  });
  const text = await response.text();
  const levels = response.ok ? JSON.parse(text).concentrationsMgPerL.length : 0;
  if (levels !== 721) throw new Error(`expected 721 levels, got status ${response.status}: ${text.slice(0, 300)}`);
  return Buffer.byteLength(text);
}
