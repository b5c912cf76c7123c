import { useState } from 'preact/hooks';
import { RESINS_PATH } from '../../server/contract/paths.ts';
import type { Resins } from '../../server/contract/resins.ts';
import type { Thickness } from '../../server/contract/thickness.ts';
import { useRead } from '../use-read.ts';
import { ChoiceField } from './field.tsx';
import { FigureField } from './figure-field.tsx';

type Asked = Readonly<Record<string, string>>;

/** What its two sides met and by which set it is reckoned, where the records do not say or somebody wants to try. */
export function ThicknessChoices({
  answer,
  run,
  runs,
  asked,
  onAsk,
}: {
  answer: Thickness | null;
  run: number;
  runs: readonly number[];
  asked: Asked;
  onAsk: (next: Asked) => void;
}) {
  const [form, setForm] = useState<Asked>({ bag: '', tool: '', bagFilm: '', toolFilm: '', resin: '', ...asked });
  const resins = useRead<Resins>(RESINS_PATH).value?.resins ?? [];
  const change = (next: Asked) => setForm({ ...form, ...next });
  const sensors = answer?.sensors ?? [];
  const isAir = (channel: string) => sensors.some((one) => one.channel === channel && one.role === 'air');
  const work = (event: Event) => {
    event.preventDefault();
    onAsk({ ...form, bagFilm: decimal(form.bagFilm), toolFilm: decimal(form.toolFilm) });
  };
  const choices = (kept: string) => [
    { value: '', text: 'as the load says' },
    ...sensors.map(({ channel, place, role }) => ({
      value: channel,
      text: role === 'air' ? `air, by ${channel}` : place ? `${channel} (${place})` : channel,
    })),
    ...(kept !== '' && !sensors.some(({ channel }) => channel === kept) ? [{ value: kept, text: kept }] : []),
  ];
  return (
    <details class="section" open={answer === null}>
      <summary>Suppose other faces, another resin set or another run</summary>
      <form class="stack" onSubmit={work}>
        <div class="fields">
          {runs.length > 1 && (
            <ChoiceField
              label="Run"
              choices={runs.map((one) => ({ value: String(one), text: `run ${one}` }))}
              value={form.run ?? String(run)}
              onValue={(value) => change({ run: value })}
            />
          )}
          <ChoiceField
            label="Its bag side met"
            choices={choices(form.bag ?? '')}
            value={form.bag ?? ''}
            onValue={(bag) => change({ bag })}
          />
          {isAir(form.bag ?? '') && (
            <FigureField
              label="Film at the bag side, W/(m² K)"
              hint="Empty: the range of its vessel"
              value={form.bagFilm ?? ''}
              onValue={(bagFilm) => change({ bagFilm })}
            />
          )}
          <ChoiceField
            label="Its tool side met"
            choices={choices(form.tool ?? '')}
            value={form.tool ?? ''}
            onValue={(tool) => change({ tool })}
          />
          {isAir(form.tool ?? '') && (
            <FigureField
              label="Film under the tool, W/(m² K)"
              hint="Empty: the range of its vessel"
              value={form.toolFilm ?? ''}
              onValue={(toolFilm) => change({ toolFilm })}
            />
          )}
          <ChoiceField
            label="Resin set"
            choices={[
              { value: '', text: 'the cycle’s own' },
              ...resins.map(({ code, status }) => ({ value: code, text: `${code} (${status})` })),
            ]}
            value={form.resin ?? ''}
            onValue={(resin) => change({ resin })}
          />
        </div>
        <button type="submit">Work it out</button>
      </form>
    </details>
  );
}

function decimal(typed: string | undefined): string {
  return (typed ?? '').trim().replace(',', '.');
}
