/** One module named by another, as it stands in the text. */
export interface Import {
  readonly specifier: string;
  readonly typeOnly: boolean;
}

export interface ReadImports {
  readonly imports: readonly Import[];
  /** Dynamic imports whose name is not a plain string: their direction cannot be read, so they are not allowed. */
  readonly nonLiteral: number;
}

/** Reads what a source text imports: static, re-export, side effect, dynamic, `import('…')` types, workers by URL. */
export function readImports(source: string): ReadImports {
  const text = withoutComments(source);
  const imports: Import[] = [];
  for (const m of text.matchAll(
    /^[ \t]*(?:import|export)\b(\s+type\b(?!\s*[,=]|\s+from\b))?[^'"`;]*?\bfrom\s*['"]([^'"]+)['"]/gm,
  )) {
    imports.push({ specifier: m[2]!, typeOnly: m[1] !== undefined });
  }
  for (const m of text.matchAll(/^[ \t]*import\s*['"]([^'"]+)['"]/gm)) {
    imports.push({ specifier: m[1]!, typeOnly: false });
  }
  let nonLiteral = 0;
  for (const m of text.matchAll(/(?<![.\w])(?:import|require)\(\s*(?:(['"])([^'"]*)\1\s*[,)]|)/g)) {
    if (m[2] === undefined) nonLiteral += 1;
    else imports.push({ specifier: m[2], typeOnly: false });
  }
  for (const m of text.matchAll(/new URL\(\s*['"]([^'"]+\.(?:ts|tsx|js))['"]\s*,\s*import\.meta\.url/g)) {
    imports.push({ specifier: m[1]!.replace(/\.js$/, '.ts'), typeOnly: false });
  }
  return { imports, nonLiteral };
}

/** The text with its comments blanked; `//` inside a string stays, because it follows a colon or a letter there. */
export function withoutComments(source: string): string {
  return source
    .replace(/\/\*[\s\S]*?\*\//g, (comment) => comment.replace(/[^\n]/g, ' '))
    .replace(/(^|[\s;,{}()])\/\/[^\n]*/g, '$1');
}
