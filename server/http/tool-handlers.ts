import { setTool } from '../actions/set-tool.ts';
import type { ToolView } from '../contract/tools.ts';
import type { Db } from '../store/database.ts';
import { listPartsOfTool } from '../store/parts.ts';
import { listTools, readToolRecords, requireTool } from '../store/tools.ts';
import type { SomeHandlers } from './handler.ts';

export const toolHandlers: SomeHandlers<'listTools' | 'readTool' | 'setTool'> = {
  listTools: ({ db }) => ({ tools: listTools(db) }),
  readTool: ({ db }, { params }) => toolView(db, params.tool ?? ''),
  setTool(parts, { params, body }) {
    const { tool = '' } = params;
    setTool(parts, tool, body);
    return toolView(parts.db, tool);
  },
};

function toolView(db: Db, code: string): ToolView {
  const [record = null, ...earlier] = readToolRecords(db, requireTool(db, code));
  return { code, record, earlier, parts: listPartsOfTool(db, code) };
}
