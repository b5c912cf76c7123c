import { crc32 } from 'node:zlib';

/** A cell: text, a figure, an error code, or a serial day shown as a date. */
export type SheetCell = string | number | null | { readonly serial: number } | { readonly error: string };

/**
 * A workbook of one sheet, written by hand so that it is nobody's reader who says what a workbook is.
 *
 * Source: ISO/IEC 29500-1:2016, 18.3 (sheets), 18.8 (styles; number format 22 is a date with a time of day).
 */
export function makeXlsx(rows: readonly (readonly SheetCell[])[], { date1904 = false } = {}): Uint8Array {
  const main = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';
  const relations = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
  const packaging = 'http://schemas.openxmlformats.org/package/2006';
  const types = 'application/vnd.openxmlformats-officedocument.spreadsheetml';
  const cells = rows
    .map(
      (row, r) => `<row r="${r + 1}">${row.map((cell, c) => cellXml(cell, `${columnName(c)}${r + 1}`)).join('')}</row>`,
    )
    .join('');
  return zipped({
    '[Content_Types].xml': `<Types xmlns="${packaging}/content-types"><Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/><Override PartName="/xl/workbook.xml" ContentType="${types}.sheet.main+xml"/><Override PartName="/xl/worksheets/sheet1.xml" ContentType="${types}.worksheet+xml"/><Override PartName="/xl/styles.xml" ContentType="${types}.styles+xml"/></Types>`,
    '_rels/.rels': `<Relationships xmlns="${packaging}/relationships"><Relationship Id="rId1" Type="${relations}/officeDocument" Target="xl/workbook.xml"/></Relationships>`,
    'xl/workbook.xml': `<workbook xmlns="${main}" xmlns:r="${relations}"><workbookPr${date1904 ? ' date1904="1"' : ''}/><sheets><sheet name="Log" sheetId="1" r:id="rId1"/></sheets></workbook>`,
    'xl/_rels/workbook.xml.rels': `<Relationships xmlns="${packaging}/relationships"><Relationship Id="rId1" Type="${relations}/worksheet" Target="worksheets/sheet1.xml"/><Relationship Id="rId2" Type="${relations}/styles" Target="styles.xml"/></Relationships>`,
    'xl/styles.xml': `<styleSheet xmlns="${main}"><fonts count="1"><font/></fonts><fills count="1"><fill/></fills><borders count="1"><border/></borders><cellStyleXfs count="1"><xf/></cellStyleXfs><cellXfs count="2"><xf numFmtId="0"/><xf numFmtId="22" applyNumberFormat="1"/></cellXfs></styleSheet>`,
    'xl/worksheets/sheet1.xml': `<worksheet xmlns="${main}"><sheetData>${cells}</sheetData></worksheet>`,
  });
}

function cellXml(cell: SheetCell, place: string): string {
  if (cell === null) return '';
  if (typeof cell === 'number') return `<c r="${place}"><v>${cell}</v></c>`;
  if (typeof cell === 'string') {
    const text = cell.replaceAll('&', '&amp;').replaceAll('<', '&lt;');
    return `<c r="${place}" t="inlineStr"><is><t xml:space="preserve">${text}</t></is></c>`;
  }
  if ('error' in cell) return `<c r="${place}" t="e"><v>${cell.error}</v></c>`;
  return `<c r="${place}" s="1"><v>${cell.serial}</v></c>`;
}

function columnName(column: number): string {
  return column < 26
    ? String.fromCharCode(65 + column)
    : columnName(Math.floor(column / 26) - 1) + columnName(column % 26);
}

/** A zip archive without compression: PKWARE APPNOTE 6.3.10, 4.3.7, 4.3.12 and 4.3.16. */
function zipped(files: Readonly<Record<string, string>>): Uint8Array {
  const parts: Buffer[] = [];
  const directory: Buffer[] = [];
  let offset = 0;
  for (const [name, text] of Object.entries(files)) {
    const content = Buffer.from(text);
    const shared = Buffer.alloc(26);
    shared.writeUInt16LE(20, 0);
    shared.writeUInt32LE(crc32(content), 10);
    shared.writeUInt32LE(content.length, 14);
    shared.writeUInt32LE(content.length, 18);
    shared.writeUInt16LE(Buffer.byteLength(name), 22);
    const local = Buffer.concat([Buffer.from('PK\x03\x04'), shared, Buffer.from(name), content]);
    const tail = Buffer.alloc(14);
    tail.writeUInt32LE(offset, 10);
    directory.push(Buffer.concat([Buffer.from('PK\x01\x02\x14\x00', 'latin1'), shared, tail, Buffer.from(name)]));
    parts.push(local);
    offset += local.length;
  }
  const entries = Buffer.concat(directory);
  const end = Buffer.alloc(22);
  end.write('PK\x05\x06', 'latin1');
  end.writeUInt16LE(directory.length, 8);
  end.writeUInt16LE(directory.length, 10);
  end.writeUInt32LE(entries.length, 12);
  end.writeUInt32LE(offset, 16);
  return Buffer.concat([...parts, entries, end]);
}
