import type { ComponentChildren } from 'preact';
import { useId } from 'preact/hooks';

interface Common {
  readonly label: ComponentChildren;
  readonly hint?: ComponentChildren;
  readonly wrong?: string | null | undefined;
  /** Shown as wrong without words of its own: the hint says why. */
  readonly isOpen?: boolean;
  readonly value: string;
}

interface TextFieldProps extends Common {
  readonly type?: 'text' | 'search' | 'number' | 'datetime-local' | 'password';
  readonly required?: boolean;
  readonly maxLength?: number;
  readonly min?: number;
  readonly step?: number;
  /** Id of a datalist with what may be meant. */
  readonly list?: string;
  readonly inputMode?: 'decimal' | 'numeric';
  readonly pattern?: string;
  readonly title?: string;
  /** At every key. */
  readonly onValue?: (value: string) => void;
  /** When the line is left or Enter pressed. */
  readonly onLeave?: (value: string) => void;
  readonly onKeyDown?: (event: KeyboardEvent) => void;
}

/** A labelled line to type in, with its hint and what is wrong with it tied to it. */
export function TextField({ label, hint, wrong, isOpen, onValue, onLeave, ...attributes }: TextFieldProps) {
  const id = useId();
  return (
    <Frame id={id} label={label} hint={hint} wrong={wrong}>
      <input
        id={id}
        autocomplete="off"
        spellcheck={false}
        {...(attributes as object)}
        {...tied(id, hint, wrong, isOpen)}
        onInput={(event) => onValue?.(event.currentTarget.value)}
        onChange={(event) => onLeave?.(event.currentTarget.value)}
      />
    </Frame>
  );
}

interface AreaFieldProps extends Common {
  readonly rows: number;
  readonly required?: boolean;
  readonly maxLength?: number;
  readonly class?: string;
  readonly onValue: (value: string) => void;
}

export function AreaField({ label, hint, wrong, isOpen, onValue, ...attributes }: AreaFieldProps) {
  const id = useId();
  return (
    <Frame id={id} label={label} hint={hint} wrong={wrong}>
      <textarea
        id={id}
        spellcheck={false}
        {...(attributes as object)}
        {...tied(id, hint, wrong, isOpen)}
        onInput={(event) => onValue(event.currentTarget.value)}
      />
    </Frame>
  );
}

export interface Choice {
  readonly value: string;
  readonly text: string;
}

interface ChoiceFieldProps extends Common {
  readonly choices: readonly Choice[];
  readonly onValue: (value: string) => void;
}

export function ChoiceField({ label, hint, wrong, isOpen, choices, value, onValue }: ChoiceFieldProps) {
  const id = useId();
  return (
    <Frame id={id} label={label} hint={hint} wrong={wrong}>
      <select
        id={id}
        {...tied(id, hint, wrong, isOpen)}
        value={value}
        onChange={(event) => onValue(event.currentTarget.value)}
      >
        {choices.map((choice) => (
          <option key={choice.value} value={choice.value}>
            {choice.text}
          </option>
        ))}
      </select>
    </Frame>
  );
}

function Frame({
  id,
  label,
  hint,
  wrong,
  children,
}: Pick<Common, 'label' | 'hint' | 'wrong'> & { id: string; children: ComponentChildren }) {
  return (
    <div class="field">
      <label for={id}>{label}</label>
      {children}
      {hint && (
        <span class="hint" id={`${id}-hint`}>
          {hint}
        </span>
      )}
      {wrong && (
        <span class="wrong" id={`${id}-wrong`}>
          {wrong}
        </span>
      )}
    </div>
  );
}

function tied(id: string, hint: ComponentChildren, wrong: string | null | undefined, isOpen = false) {
  const ids = [hint ? `${id}-hint` : '', wrong ? `${id}-wrong` : ''].filter(Boolean).join(' ');
  return {
    ...(ids ? { 'aria-describedby': ids } : {}),
    ...(wrong || isOpen ? { 'aria-invalid': 'true' as const } : {}),
  };
}
