/** What the address of the page says after its question mark; the page keeps there what a colleague should see too. */
export function readPageQuery(): URLSearchParams {
  return new URLSearchParams(location.search);
}

/** Keeps words in the address without a new page; null takes one out. What else stands there stays. */
export function keepInPageQuery(words: Readonly<Record<string, string | null>>): void {
  const query = readPageQuery();
  for (const [name, word] of Object.entries(words)) {
    if (word === null) query.delete(name);
    else query.set(name, word);
  }
  const text = query.toString();
  history.replaceState(history.state, '', `${location.pathname}${text === '' ? '' : `?${text}`}${location.hash}`);
}
