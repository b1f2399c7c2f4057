import { readFileSync, readdirSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import ts from 'typescript';

export const ROOT = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '');
export const SOURCE_FOLDERS = ['app', 'components', 'lib', 'db', 'migrations', 'tests'];

export interface Import {
  readonly from: string;
  /** A path of ours from the root, or the name of a package (`node:` modules are left out). */
  readonly to: string;
  readonly isPackage: boolean;
  readonly typeOnly: boolean;
}

/** Files under the source folders with one of these endings, as paths from the root. */
export function filesEnding(...endings: string[]): string[] {
  return SOURCE_FOLDERS.flatMap((folder) =>
    readdirSync(path.join(ROOT, folder), { recursive: true, withFileTypes: true })
      .filter((entry) => entry.isFile() && endings.some((ending) => entry.name.endsWith(ending)))
      .map((entry) => path.relative(ROOT, path.join(entry.parentPath, entry.name))),
  ).sort();
}

function packageName(specifier: string): string {
  return specifier.split('/').slice(0, specifier.startsWith('@') ? 2 : 1).join('/');
}

function specifiersOf(file: string): { text: string; typeOnly: boolean }[] {
  const source = ts.createSourceFile(file, readFileSync(path.join(ROOT, file), 'utf8'), ts.ScriptTarget.Latest, true);
  const found: { text: string; typeOnly: boolean }[] = [];
  const visit = (node: ts.Node) => {
    if (
      (ts.isImportDeclaration(node) || ts.isExportDeclaration(node)) &&
      node.moduleSpecifier &&
      ts.isStringLiteral(node.moduleSpecifier)
    ) {
      const typeOnly = ts.isImportDeclaration(node)
        ? node.importClause?.phaseModifier === ts.SyntaxKind.TypeKeyword
        : node.isTypeOnly;
      found.push({ text: node.moduleSpecifier.text, typeOnly });
    }
    // import('…'), and new URL('…', import.meta.url) by which a Worker is named
    const argument = ts.isCallExpression(node) || ts.isNewExpression(node) ? node.arguments?.[0] : undefined;
    if (argument && ts.isStringLiteral(argument)) {
      const call = node as ts.CallExpression | ts.NewExpression;
      const dynamic = call.expression.kind === ts.SyntaxKind.ImportKeyword;
      const url = ts.isNewExpression(call) && call.expression.getText() === 'URL' && /\.[cm]?tsx?$/.test(argument.text);
      if (dynamic || url) found.push({ text: argument.text, typeOnly: false });
    }
    if (ts.isImportTypeNode(node) && ts.isLiteralTypeNode(node.argument) && ts.isStringLiteral(node.argument.literal)) {
      found.push({ text: node.argument.literal.text, typeOnly: true });
    }
    ts.forEachChild(node, visit);
  };
  visit(source);
  return found;
}

/** Every import of every source file, resolved. */
export function importGraph(): Import[] {
  return filesEnding('.ts', '.tsx').flatMap((from) =>
    specifiersOf(from)
      .filter(({ text }) => !text.startsWith('node:'))
      .map(({ text, typeOnly }) => {
        if (text.startsWith('@/')) return { from, to: text.slice(2), isPackage: false, typeOnly };
        if (text.startsWith('.')) {
          return { from, to: path.normalize(path.join(path.dirname(from), text)), isPackage: false, typeOnly };
        }
        return { from, to: packageName(text), isPackage: true, typeOnly };
      }),
  );
}
