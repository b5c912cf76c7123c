import { ERROR_CODES, type ErrorCode } from '../../models/errors.ts';
import { PROBLEM_KINDS } from './problem.ts';

/** The help page of a problem's `type`; null where there is no such problem. */
export function problemPage(code: string): string | null {
  if (!isErrorCode(code)) return null;
  const { title, help, status } = PROBLEM_KINDS[code];
  return `<!doctype html>
<html lang="en">
<head><meta charset="utf-8"><meta name="viewport" content="width=device-width"><title>${text(title)}</title></head>
<body>
<main>
<h1>${text(title)}</h1>
<p>${text(help)}</p>
<p>Code <code>${code}</code>, HTTP status ${status}. The answer that brought you here names the place under "detail" and "facts".</p>
<p><a href="/">Back to the workshop</a></p>
</main>
</body>
</html>
`;
}

function isErrorCode(code: string): code is ErrorCode {
  return (ERROR_CODES as readonly string[]).includes(code);
}

function text(words: string): string {
  return words.replace(/[&<>"]/g, (sign) => `&#${sign.charCodeAt(0)};`);
}
