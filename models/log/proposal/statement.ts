/** One thing a proposed layout says, and how sure it is. */
export interface LayoutStatement {
  /** Place in the layout: `encoding`, `time.pattern`, `channels/3/unit` … */
  readonly key: string;
  /** `asked` must be answered before the layout can be used; the layout holds empty text there. */
  readonly basis: 'proved' | 'guessed' | 'asked';
  /** The evidence, as a sentence. */
  readonly because: string;
  /** What may be answered, where the answers are few. */
  readonly choices: string[];
}

export function proved(key: string, because: string): LayoutStatement {
  return { key, basis: 'proved', because, choices: [] };
}

export function guessed(key: string, because: string, choices: string[] = []): LayoutStatement {
  return { key, basis: 'guessed', because, choices };
}

export function asked(key: string, because: string, choices: string[] = []): LayoutStatement {
  return { key, basis: 'asked', because, choices };
}
