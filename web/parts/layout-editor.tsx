import type { Layout, TimeLayout } from '../../models/log/layout.ts';
import type { ProposalStatement } from '../../server/contract/imports.ts';
import { answerAt, withAnswer } from '../words/layout-edits.ts';
import { zone } from '../workshop.ts';
import { Basis } from './basis.tsx';
import { ChoiceField, TextField } from './field.tsx';
import { Zones } from './zones.tsx';

export interface LayoutEditing {
  readonly layout: Layout;
  readonly statements: readonly ProposalStatement[];
  /** Places a person has answered or corrected. */
  readonly answered: ReadonlySet<string>;
  readonly onChange: (next: Layout, key: string) => void;
}

/** Everything a layout says of a file but its channels, each with how sure it is; all of it can be corrected. */
export function LayoutEditor(editing: LayoutEditing) {
  return (
    <>
      <div class="fields">
        <Place editing={editing} place="encoding" label="Written in" choices={ENCODINGS} />
        <Place editing={editing} place="delimiter" label="Cells apart by" choices={DELIMITERS} />
        <Place editing={editing} place="decimal" label="Decimals with" choices={DECIMALS} />
        <Place editing={editing} place="header" label="Line of the headings" isLine />
        <Place editing={editing} place="units" label="Line of the units" isLine />
        <Place editing={editing} place="firstReading" label="Line of the first reading" isLine />
        <MissingCodes editing={editing} />
      </div>
      <TimeFields editing={editing} />
      <Zones />
    </>
  );
}

const ENCODINGS = ['utf-8', 'utf-16le', 'utf-16be', 'windows-1252'].map((word) => ({ value: word, text: word }));
const DELIMITERS = [
  { value: ',', text: 'comma' },
  { value: ';', text: 'semicolon' },
  { value: '\t', text: 'tab' },
];
const DECIMALS = [
  { value: '.', text: 'point' },
  { value: ',', text: 'comma' },
];
const DEFAULTS: Readonly<Record<string, string>> = { encoding: 'utf-8', delimiter: ',', decimal: '.' };

function Place({
  editing,
  place,
  label,
  choices,
  isLine = false,
  list,
}: {
  editing: LayoutEditing;
  place: string;
  label: string;
  choices?: readonly { value: string; text: string }[];
  /** A line's number. */
  isLine?: boolean;
  list?: string;
}) {
  const { layout, statements, answered, onChange } = editing;
  const statement = statements.find((one) => one.key === place);
  const value = answerAt(layout, place) || (DEFAULTS[place] ?? '');
  const isOpen = statement?.basis === 'asked' && !answered.has(place);
  const field = {
    label,
    hint: <Basis statement={statement} isAnswered={answered.has(place)} />,
    value: isOpen ? '' : value,
    onValue: (next: string) => onChange(withAnswer(layout, place, next), place),
    isOpen,
  };
  const offered = statement && statement.choices.length > 0 ? statement.choices.map(asChoice) : choices;
  if (!offered)
    return <TextField {...field} {...(isLine ? { type: 'number', min: 1 } : {})} {...(list ? { list } : {})} />;
  const all =
    offered.some((choice) => choice.value === value) || value === '' ? offered : [...offered, asChoice(value)];
  return <ChoiceField {...field} choices={isOpen ? [{ value: '', text: 'choose' }, ...all] : all} />;
}

function asChoice(value: string) {
  return { value, text: value };
}

function MissingCodes({ editing }: { editing: LayoutEditing }) {
  const { layout, statements, answered, onChange } = editing;
  const statement = statements.find((one) => one.key === 'missing');
  return (
    <TextField
      label="Cells that mean no reading"
      hint={
        <>
          Apart by a bar |; an empty cell always does.{' '}
          <Basis statement={statement} isAnswered={answered.has('missing')} />
        </>
      }
      value={(layout.missing ?? []).join(' | ')}
      onLeave={(codes) => onChange({ ...layout, missing: piecesOf(codes) }, 'missing')}
    />
  );
}

function TimeFields({ editing }: { editing: LayoutEditing }) {
  const { layout, onChange } = editing;
  const time = layout.time;
  const kind = 'elapsed' in time ? 'elapsed' : 'serialDays' in time ? 'serialDays' : 'stamp';
  const change = (next: TimeLayout) => onChange({ ...layout, time: next }, 'time');
  const { columns } = time;
  const zoneNow = 'zone' in time ? time.zone : zone.value;
  return (
    <div class="fields">
      <ChoiceField
        label="Time is written as"
        choices={TIME_KINDS}
        value={kind}
        onValue={(next) => {
          if (next === 'stamp') change({ columns, pattern: 'dd/MM/yyyy HH:mm:ss', zone: zoneNow });
          if (next === 'elapsed') change({ columns, elapsed: 's', startsAt: '' });
          if (next === 'serialDays') change({ columns, serialDays: true, zone: zoneNow });
        }}
      />
      <TextField
        label="Columns of time"
        hint="By their headings, apart by a bar |"
        value={columns.join(' | ')}
        onLeave={(names) => change({ ...time, columns: piecesOf(names) })}
      />
      {kind === 'stamp' && <Place editing={editing} place="time.pattern" label="Pattern" />}
      {kind !== 'elapsed' && (
        <Place editing={editing} place="time.zone" label="Zone of the recorder’s clock" list="zones" />
      )}
      {kind === 'elapsed' && (
        <>
          <Place
            editing={editing}
            place="time.elapsed"
            label="Elapsed in"
            choices={[asChoice('s'), asChoice('min'), asChoice('h')]}
          />
          <Place editing={editing} place="time.startsAt" label="Since the instant" />
        </>
      )}
    </div>
  );
}

const TIME_KINDS = [
  { value: 'stamp', text: 'date and clock time' },
  { value: 'elapsed', text: 'time elapsed since the start' },
  { value: 'serialDays', text: 'days of a spreadsheet' },
];

/** `Date | Time` taken apart; what stands between bars may hold spaces. */
function piecesOf(text: string): string[] {
  return text
    .split('|')
    .map((piece) => piece.trim())
    .filter(Boolean);
}
