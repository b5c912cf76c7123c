import type { Resin } from '../../../models/cure/resin.ts';
import { beginAir, heatTransferAt, type VesselPhysics } from './air.ts';
import { type BagLine, beginBag } from './bag-line.ts';
import { createHistory, cutHistory, type History } from './history.ts';
import { conditionsAt, type Mishap } from './mishaps.ts';
import { beginPoint, type Point } from './point.ts';
import { beginProgramme, type Programme } from './programme.ts';
import { heatOfLaminateJPerM3, reactionRate } from './reaction.ts';
import { beginPressure, type PressureProgramme, type Seen } from './vessel-pressure.ts';

/** Everything that decides how a run goes, before any instrument looks at it. */
export interface RunSetup {
  readonly startMs: number;
  readonly stepS: number;
  readonly vessel: VesselPhysics;
  readonly ambientC: number;
  readonly programme: Programme;
  readonly pressure: PressureProgramme | null;
  /** The bags are opened to atmosphere when the vessel first reaches this. */
  readonly ventsAtBar: number | null;
  readonly resin: Resin;
  /** One for each thermocouple. */
  readonly points: readonly Point[];
  readonly lines: readonly BagLine[];
  readonly mishaps: readonly Mishap[];
  /** The record runs on this long after the programme has ended and the vessel is let down. */
  readonly tailMin: number;
  readonly longestMin: number;
}

/** Plays a run in fixed steps. No noise and no instruments: this is what really happened. */
export function playRun(setup: RunSetup): History {
  const { stepS, ambientC, vessel } = setup;
  const rate = reactionRate(setup.resin);
  const heat = heatOfLaminateJPerM3(setup.resin);
  const programme = beginProgramme(setup.programme, ambientC);
  const air = beginAir(vessel, ambientC);
  const pressure = beginPressure(setup.pressure);
  const points = setup.points.map((point) => beginPoint(point, ambientC, rate, heat));
  const bags = setup.lines.map(beginBag);
  const most = Math.ceil((setup.longestMin * 60) / stepS) + 1;
  const history = createHistory(setup, most);

  let isVented = false;
  let endedS: number | null = null;
  let n = 0;
  for (; n < most; n++) {
    const atS = n * stepS;
    history.record(n, {
      airC: air.temperatureC,
      setpointC: programme.setpointC,
      gaugeBar: pressure.gaugeBar,
      points,
      bags,
    });
    if (programme.hasEnded && pressure.isReleased) endedS ??= atS;
    if (endedS !== null && atS - endedS >= setup.tailMin * 60) break;

    const now = conditionsAt(setup.mishaps, atS / 60);
    const seen = look(points, atS / 60, programme.mayCool);
    if (now.programmeRuns) programme.advance(stepS, air.temperatureC, seen.laggingC);
    pressure.advance(stepS, seen, { powered: now.powered, lossBarPerMin: now.lossBarPerMin });
    if (setup.ventsAtBar !== null && pressure.gaugeBar >= setup.ventsAtBar) isVented = true;
    const airFromC = air.temperatureC;
    const surfaceC = points.reduce((sum, point) => sum + point.surfaceC, 0) / points.length;
    air.advance(stepS, programme.setpointC - now.setpointDropC, surfaceC, {
      powered: now.powered,
      mayCool: programme.mayCool,
    });
    const h = heatTransferAt(vessel, pressure.gaugeBar, now.powered);
    for (const point of points) point.advance(stepS, airFromC, air.temperatureC, h, ambientC);
    for (const [i, bag] of bags.entries()) {
      bag.advance(stepS, atS / 60, {
        powered: now.powered,
        isVented,
        leakPerMin: now.leakPerMin(setup.lines[i]!.name),
        gaugeBar: pressure.gaugeBar,
      });
    }
  }
  return cutHistory(history, Math.min(n + 1, most));
}

function look(points: readonly { junctionC: number }[], minute: number, isCooling: boolean): Seen {
  let leadingC = -Infinity;
  let laggingC = Infinity;
  for (const { junctionC } of points) {
    leadingC = Math.max(leadingC, junctionC);
    laggingC = Math.min(laggingC, junctionC);
  }
  return { minute, leadingC, laggingC, isCooling };
}
