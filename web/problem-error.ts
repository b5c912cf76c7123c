/** One fault among several in a body, with the key it belongs to. */
export interface Pointed {
  readonly pointer: string;
  readonly detail: string;
}

export type ProblemFacts = Readonly<Record<string, string | number | boolean | null>>;

/** A refusal of the server (RFC 9457), or its silence, as pages show it: nothing invented, nothing left out. */
export class ProblemError extends Error {
  override readonly name = 'ProblemError';
  readonly code: string;
  readonly status: number;
  readonly title: string;
  readonly detail: string;
  readonly facts: ProblemFacts;
  readonly errors: readonly Pointed[];
  readonly instance: string | null;

  constructor(problem: {
    code: string;
    status: number;
    title: string;
    detail: string;
    facts?: ProblemFacts;
    errors?: readonly Pointed[];
    instance?: string | null;
    cause?: unknown;
  }) {
    super(problem.detail, { cause: problem.cause });
    this.code = problem.code;
    this.status = problem.status;
    this.title = problem.title;
    this.detail = problem.detail;
    this.facts = problem.facts ?? {};
    this.errors = problem.errors ?? [];
    this.instance = problem.instance ?? null;
  }
}

export function problemOffline(cause: unknown): ProblemError {
  return new ProblemError({
    code: 'no-answer',
    status: 0,
    title: 'The server does not answer',
    detail: 'Nothing was sent or changed by this attempt. What you typed is kept on this page; try again.',
    cause,
  });
}

export async function problemFrom(response: Response): Promise<ProblemError> {
  const body = await readProblem(response);
  return new ProblemError({
    code: lastSegment(text(body.type)) ?? 'unknown',
    status: response.status,
    title: text(body.title) ?? `The server answered ${response.status}`,
    detail: text(body.detail) ?? 'It gave no reason.',
    facts: (body.facts ?? {}) as ProblemFacts,
    errors: Array.isArray(body.errors) ? (body.errors as Pointed[]) : [],
    instance: text(body.instance),
  });
}

async function readProblem(response: Response): Promise<Record<string, unknown>> {
  if (!response.headers.get('content-type')?.includes('json')) return {};
  try {
    return (await response.json()) as Record<string, unknown>;
  } catch {
    // A body cut short: the status line is still worth showing.
    return {};
  }
}

function text(value: unknown): string | null {
  return typeof value === 'string' ? value : null;
}

function lastSegment(type: string | null): string | null {
  return type ? (type.split('/').at(-1) ?? null) : null;
}
