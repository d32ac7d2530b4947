// Reads what source files import and which of the runtime's globals they use.
import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, relative, sep } from 'node:path';
import ts from 'typescript';

export interface Use {
  readonly file: string;
  readonly line: number;
  /** A path from the project's root for a file of the project, else the specifier as written. */
  readonly target: string;
  readonly isTypeOnly: boolean;
}

export function sourceFiles(folder: string): string[] {
  return readdirSync(folder, { withFileTypes: true, recursive: true })
    .filter((entry) => entry.isFile() && /\.(ts|svelte)$/.test(entry.name))
    .map((entry) => relative('.', join(entry.parentPath, entry.name)).split(sep).join('/'))
    .sort();
}

function parse(file: string): ts.SourceFile {
  const text = readFileSync(file, 'utf8');
  return ts.createSourceFile(file, file.endsWith('.svelte') ? scriptsOnly(text) : text, ts.ScriptTarget.Latest, true);
}

/** The markup is blanked out, line by line, so that line numbers stay. */
function scriptsOnly(component: string): string {
  let rest = component;
  let kept = '';
  const blank = (text: string): string => text.replace(/[^\n]/g, ' ');
  for (const found of component.matchAll(/<script[^>]*>([\s\S]*?)<\/script>/g)) {
    const begin = rest.indexOf(found[0]);
    kept += blank(rest.slice(0, begin)) + blank(found[0].slice(0, found[0].indexOf('>') + 1)) + (found[1] ?? '') + ';';
    rest = rest.slice(begin + found[0].length);
  }
  return kept;
}

/** Static, dynamic and re-exporting imports, in order. */
export function importsOf(file: string): Use[] {
  const source = parse(file);
  const uses: Use[] = [];
  const add = (node: ts.Node, specifier: string, isTypeOnly: boolean): void => {
    const target = specifier.startsWith('.') ? join(dirname(file), specifier).split(sep).join('/') : specifier;
    uses.push({ file, line: lineOf(source, node), target, isTypeOnly });
  };
  const visit = (node: ts.Node): void => {
    if (ts.isImportDeclaration(node) && ts.isStringLiteral(node.moduleSpecifier)) {
      add(node, node.moduleSpecifier.text, isTypeImport(node));
    } else if (ts.isExportDeclaration(node) && node.moduleSpecifier && ts.isStringLiteral(node.moduleSpecifier)) {
      add(node, node.moduleSpecifier.text, node.isTypeOnly);
    } else if (ts.isImportTypeNode(node) && ts.isLiteralTypeNode(node.argument)) {
      add(node, (node.argument.literal as ts.StringLiteral).text, true);
    } else if (ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword) {
      const [argument] = node.arguments;
      if (argument && ts.isStringLiteral(argument)) add(node, argument.text, false);
    }
    ts.forEachChild(node, visit);
  };
  visit(source);
  return uses;
}

function isTypeImport(node: ts.ImportDeclaration): boolean {
  const clause = node.importClause;
  if (!clause) return false;
  if (clause.phaseModifier === ts.SyntaxKind.TypeKeyword) return true;
  const bindings = clause.namedBindings;
  if (clause.name || !bindings || !ts.isNamedImports(bindings)) return false;
  return bindings.elements.every((element) => element.isTypeOnly);
}

/** Where a file reads one of the given globals: bare, as in `fetch(…)`, or dotted, as in `Math.random`. */
export function globalsOf(file: string, names: readonly string[]): Use[] {
  const source = parse(file);
  const uses: Use[] = [];
  const visit = (node: ts.Node): void => {
    const dotted = ts.isPropertyAccessExpression(node) ? node.getText(source) : '';
    const bare = ts.isIdentifier(node) && isRead(node) ? node.text : '';
    const target = names.find((name) => name === dotted || name === bare);
    if (target) uses.push({ file, line: lineOf(source, node), target, isTypeOnly: false });
    ts.forEachChild(node, visit);
  };
  visit(source);
  return uses;
}

/** Neither the name of a member nor of something declared here. */
function isRead(node: ts.Identifier): boolean {
  const { parent } = node;
  if (ts.isPropertyAccessExpression(parent)) return parent.expression === node;
  if (ts.isTypeReferenceNode(parent)) return false;
  const declares =
    ts.isPropertyAssignment(parent) ||
    ts.isPropertySignature(parent) ||
    ts.isPropertyDeclaration(parent) ||
    ts.isMethodDeclaration(parent) ||
    ts.isParameter(parent) ||
    ts.isVariableDeclaration(parent) ||
    ts.isBindingElement(parent);
  return !(declares && parent.name === node);
}

function lineOf(source: ts.SourceFile, node: ts.Node): number {
  return source.getLineAndCharacterOfPosition(node.getStart(source)).line + 1;
}
