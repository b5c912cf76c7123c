/** When an operator or a programme does something. */
export type Trigger =
  | { readonly at: 'minute'; readonly minute: number }
  | { readonly at: 'leading-reaches' | 'lagging-reaches' | 'hottest-cools-to'; readonly temperatureC: number };

/** Whether it is time, from what can be seen now. While cooling `leadingC` is still the hottest. */
export function isDue(trigger: Trigger, seen: { minute: number; leadingC: number; laggingC: number }): boolean {
  if (trigger.at === 'minute') return seen.minute >= trigger.minute;
  if (trigger.at === 'leading-reaches') return seen.leadingC >= trigger.temperatureC;
  if (trigger.at === 'lagging-reaches') return seen.laggingC >= trigger.temperatureC;
  return seen.leadingC <= trigger.temperatureC;
}
