import type { Cycle, CycleEvent } from './cycle.ts';
import { figure } from './words-of-figures.ts';

/** When an event is: `at heat-on`, `when all judged sensors are at 100 °C or above`, `10 min after heat-on` … */
export function whenWords(cycle: Cycle, event: CycleEvent): string {
  const words = eventWords(cycle, event);
  if ((event.plus ?? 0) !== 0) return words;
  return 'value' in event ? `when ${words}` : `at ${words}`;
}

/** `from heat-on until the vessel pressure first reaches 1.4 bar` */
export function betweenWords(cycle: Cycle, from: CycleEvent, until: CycleEvent): string {
  return `from ${whenWords(cycle, from).replace(/^at /, '')} until ${eventWords(cycle, until)}`;
}

/** The instant that bounds a window: `heat-on`, `all judged sensors are at 100 °C or above` … */
export function eventWords(cycle: Cycle, event: CycleEvent): string {
  const instant = instantWords(cycle, event);
  const { plus = 0 } = event;
  if (plus === 0) return instant;
  return `${figure(Math.abs(plus))} min ${plus > 0 ? 'after' : 'before'} ${instant}`;
}

function instantWords(cycle: Cycle, event: CycleEvent): string {
  const unit = cycle.units.temperature;
  const pressure = cycle.units.pressure ?? '';
  const vacuum = vacuumWords(cycle);
  switch (event.at) {
    case 'start':
      return 'the start of the log';
    case 'end':
      return 'the end of the log';
    case 'heat-on':
      return 'heat-on';
    case 'gel':
      return 'the earliest estimated gel of a judged sensor';
    case 'first-reaches':
      return `the first judged sensor reaches ${figure(event.value)} ${unit}`;
    case 'all-reach':
      return `all judged sensors are at ${figure(event.value)} ${unit} or above`;
    case 'first-cools-to':
      return `the first judged sensor has cooled to ${figure(event.value)} ${unit}`;
    case 'all-cool-to':
      return `all judged sensors have cooled to ${figure(event.value)} ${unit}`;
    case 'opens':
      return `the opening of ${event.stage}`;
    case 'closes':
      return `the closing of ${event.stage}`;
    case 'pressure-reaches':
      return `the vessel pressure first reaches ${figure(event.value)} ${pressure}`;
    case 'pressure-falls-to':
      return `the vessel pressure falls to ${figure(event.value)} ${pressure}`;
    case 'vacuum-reaches':
      return `the bag vacuum first reaches ${figure(event.value)} ${vacuum}`;
    case 'vacuum-falls-to':
      return `the bag vacuum falls to ${figure(event.value)} ${vacuum}`;
  }
}

/** `bar below ambient` or `mbar abs`: a vacuum's unit never without its zero point. */
export function vacuumWords(cycle: Cycle): string {
  const unit = cycle.units.vacuum ?? '';
  return unit.endsWith(' abs') ? unit : `${unit} below ambient`;
}
