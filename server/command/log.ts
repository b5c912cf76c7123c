/** What the server has to say while it runs, a JSON line each, on standard error. */
export interface Log {
  info(facts: object, message: string): void;
  error(facts: object, message: string): void;
}

export function createLog(write = (line: string) => process.stderr.write(line) as unknown): Log {
  const say = (level: string) => (facts: object, message: string) => {
    write(`${JSON.stringify({ level, at: new Date().toISOString(), message, ...facts }, withErrors)}\n`);
  };
  return { info: say('info'), error: say('error') };
}

/** An error has no own keys that JSON would show. */
function withErrors(_key: string, value: unknown): unknown {
  return value instanceof Error ? { name: value.name, message: value.message, stack: value.stack } : value;
}
