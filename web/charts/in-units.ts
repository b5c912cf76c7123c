import type { RunChart, Strip, StripAxis } from '../../models/chart/chart.ts';
import {
  AS_IT_STANDS,
  type Conversion,
  converted,
  pressureConversion,
  temperatureConversion,
} from '../../models/chart/shown-unit.ts';
import { roundTicks } from '../../models/chart/ticks.ts';
import type { Units } from '../../server/contract/workshop.ts';

/**
 * The same picture in the units this person reads.
 *
 * Only the picture: words and findings keep what was written. A vacuum counted from zero stays as it is, because
 * turning it round needs the barometer of the day.
 */
export function inUnits(chart: RunChart, units: Units): RunChart {
  const plans = new Map(chart.strips.map((axis) => [axis.strip, planOf(axis, units)]));
  if ([...plans.values()].every(({ conversion }) => conversion === AS_IT_STANDS)) return chart;
  const of = (strip: Strip) => {
    const { conversion } = plans.get(strip) ?? { conversion: AS_IT_STANDS };
    return (value: number) => converted(value, conversion);
  };
  const orNull = (strip: Strip, value: number | null) => (value === null ? null : of(strip)(value));
  return {
    ...chart,
    strips: chart.strips.map((axis) =>
      axisIn(axis, plans.get(axis.strip) ?? { unit: axis.unit, conversion: AS_IT_STANDS }),
    ),
    lines: chart.lines.map((line) => ({
      ...line,
      labelAt: orNull(line.strip, line.labelAt),
      value: line.value.map((value) => orNull(line.strip, value)),
    })),
    bands: chart.bands.map((band) => ({
      ...band,
      low: orNull(band.strip, band.low),
      high: orNull(band.strip, band.high),
    })),
    wedges: chart.wedges.map((wedge) => ({
      ...wedge,
      corners: wedge.corners.map(([hours, value]) => [hours, of('temperature')(value)] as const),
    })),
    marks: chart.marks.map((mark) => ({ ...mark, value: orNull(mark.strip, mark.value) })),
    dips: chart.dips.map((dip) => ({ ...dip, level: of('temperature')(dip.level) })),
    breaches: chart.breaches.map((breach) => ({ ...breach, level: of(breach.strip)(breach.level) })),
    dots: chart.dots.map((dot) => ({ ...dot, value: of(dot.strip)(dot.value) })),
  };
}

interface Plan {
  readonly unit: string;
  readonly conversion: Conversion;
}

function planOf({ strip, unit }: StripAxis, units: Units): Plan {
  const asItIs = { unit, conversion: AS_IT_STANDS };
  if (strip === 'cure' || strip === 'viscosity') return asItIs;
  const wanted = strip === 'temperature' || strip === 'tg' ? units.temperature : units[strip];
  const conversion =
    strip === 'temperature' || strip === 'tg'
      ? temperatureConversion(unit, wanted)
      : pressureConversion(strip, unit, wanted, null);
  return conversion === null ? asItIs : { unit: wanted, conversion };
}

function axisIn(axis: StripAxis, { unit, conversion }: Plan): StripAxis {
  if (conversion === AS_IT_STANDS) return axis;
  const ends = [converted(axis.low, conversion), converted(axis.high, conversion)];
  const [low, high] = [Math.min(...ends), Math.max(...ends)];
  const title = axis.title.replace(axis.unit, unit);
  return { ...axis, title, unit, low, high, ticks: roundTicks(low, high, Math.max(2, axis.ticks.length - 1)) };
}
