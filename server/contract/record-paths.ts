import { PARTS_PATH, partPath, ROLLS_PATH, runPath, withQuery } from './paths.ts';

/** Where labels, papers and tables brought in are. Builders only: no schema is loaded by who imports this. */

export const LABELS_PATH = '/api/labels';

export function labelPath(kind: string, code: string, symbol: string): string {
  return withQuery(LABELS_PATH, { kind, code, symbol });
}

/** The page where labels of one thing are printed. */
export function labelsPage(kind: string, code: string): string {
  return withQuery('/labels', { kind, code });
}

export function partPapersPath(serial: string): string {
  return `${partPath(serial)}/papers`;
}

export function runPapersPath(run: number): string {
  return `${runPath(run)}/papers`;
}

/** Where a photograph or document is sent. */
export function sendPaperPath(papers: string, name: string, shows: string): string {
  return withQuery(papers, { name, shows });
}

export function paperFilePath(paper: number): string {
  return `/api/papers/${paper}/file`;
}

export function paperPicturePath(paper: number): string {
  return `/api/papers/${paper}/picture`;
}

export function partDecisionsPath(serial: string): string {
  return `${partPath(serial)}/nonconformances`;
}

/** Where a table of parts or rolls is sent: with `commit`, the SHA-256 its preview showed, it is kept. */
export function tablePath(kind: 'parts' | 'rolls', query: { columns?: string | undefined; commit?: string }): string {
  return withQuery(`${kind === 'parts' ? PARTS_PATH : ROLLS_PATH}/import`, query);
}
