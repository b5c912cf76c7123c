import type { TableKind } from '../../server/contract/tables.ts';

export const TABLE_WORDS: Readonly<
  Record<
    TableKind,
    { title: string; needs: string; page: string; pageName: string; fields: Readonly<Record<string, string>> }
  >
> = {
  parts: {
    title: 'Parts from a table',
    needs: 'One row a part, known by its serial. Title, drawing, tool, work order, thickness and plies come along.',
    page: '/parts',
    pageName: 'All parts',
    fields: {
      serial: 'serial',
      title: 'title',
      drawing: 'drawing',
      'drawing-issue': 'drawing issue',
      tool: 'tool',
      'work-order': 'work order',
      customer: 'customer',
      'thickness-mm': 'thickness, mm',
      plies: 'plies',
    },
  },
  rolls: {
    title: 'Rolls from a table',
    needs: 'One row a roll: its code, its batch, which is on record already, and when it came.',
    page: '/materials',
    pageName: 'All materials',
    fields: {
      roll: 'roll',
      batch: 'batch',
      received: 'received',
      as: 'frozen or out',
      'length-m': 'length, m',
      'out-minutes': 'minutes out before',
    },
  },
};
