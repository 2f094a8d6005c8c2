import { readdirSync, readFileSync } from 'node:fs';
import { join, relative } from 'node:path';
import ts from 'typescript';

/** The source of the geometry library, read rather than run: which functions answer an outcome, and which reasons are given. */
const folder = join(import.meta.dirname, '../../libs/geometry');

function sources(): ts.SourceFile[] {
  return readdirSync(folder, { recursive: true, encoding: 'utf8' })
    .filter((name) => name.endsWith('.ts') && !name.endsWith('.spec.ts') && !name.startsWith('testing'))
    .sort()
    .map((name) => {
      const path = join(folder, name);
      return ts.createSourceFile(path, readFileSync(path, 'utf8'), ts.ScriptTarget.Latest, true);
    });
}

/** Exported functions that say in their type that they answer an outcome, as `events/phases.strokePhases`. */
export function outcomeFunctions(): string[] {
  return sources().flatMap((source) =>
    source.statements.flatMap((statement) => {
      if (!ts.isFunctionDeclaration(statement) || !statement.name) return [];
      const isExported = statement.modifiers?.some(({ kind }) => kind === ts.SyntaxKind.ExportKeyword);
      if (!isExported || !statement.type?.getText().startsWith('Outcome<')) return [];
      return [`${relative(folder, source.fileName).replace(/\.ts$/, '')}.${statement.name.text}`];
    }),
  );
}

/** Every reason code that is written in a refusal. */
export function reasonCodes(): string[] {
  const codes = new Set<string>();
  const visit = (node: ts.Node): void => {
    if (ts.isCallExpression(node) && node.expression.getText() === 'refused')
      for (const argument of node.arguments) collect(argument);
    ts.forEachChild(node, visit);
  };
  const collect = (node: ts.Node): void => {
    if (ts.isStringLiteral(node)) codes.add(node.text);
    // Of `a === 'x' ? 'y' : b` the condition is no reason.
    else if (ts.isConditionalExpression(node)) [node.whenTrue, node.whenFalse].forEach(collect);
    else ts.forEachChild(node, collect);
  };
  sources().forEach(visit);
  return [...codes].sort();
}
