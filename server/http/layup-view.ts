import type { LayupView } from '../contract/layups.ts';
import type { Db } from '../store/database.ts';
import { findSimilarLayup, readLayups } from '../store/layups.ts';
import { findPart, readParticulars } from '../store/parts.ts';

/** How a part was laid up, known yet or not, and the last part like it. */
export function layupView(
  db: Db,
  serial: string,
  said: { readonly drawing?: string | undefined; readonly tool?: string | undefined } = {},
): LayupView {
  const id = findPart(db, serial);
  const particulars = id === undefined ? NOTHING : readParticulars(db, id);
  const [layup = null, ...earlier] = id === undefined ? [] : readLayups(db, id);
  const drawing = said.drawing || particulars.drawing;
  const tool = said.tool || particulars.tool;
  return {
    serial,
    known: id !== undefined,
    ...particulars,
    layup,
    earlier,
    similar: findSimilarLayup(db, { serial, drawing, tool }),
  };
}

const NOTHING = { title: null, drawing: null, drawingIssue: null, tool: null };
