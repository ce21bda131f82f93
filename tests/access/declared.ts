import { readFileSync } from 'node:fs';
import ts from 'typescript';

/** The guards of the project, and how the access table calls what they ask. */
const GUARDS: Readonly<Record<string, string>> = {
  publicAction: 'public',
  openRoute: 'public',
  requireUser: 'site',
  siteAction: 'site',
  siteRoute: 'site',
  requireProgram: 'program',
  // Of the pages of a list: `requireProgram`, then the list.
  requireList: 'program',
  programAction: 'program',
  programRoute: 'program',
  apiRoute: 'token',
  apiProgramRoute: 'token',
};

const HTTP_METHODS = new Set(['GET', 'HEAD', 'POST', 'PUT', 'PATCH', 'DELETE', 'OPTIONS']);

/** By exported name (the method of a route, the function of an action module, `page`), what is asked: `program lists.read`. */
export type Declared = Record<string, string>;

const isUseServer = (node: ts.Statement | undefined): boolean =>
  node !== undefined &&
  ts.isExpressionStatement(node) &&
  ts.isStringLiteral(node.expression) &&
  node.expression.text === 'use server';

const isExported = (node: ts.Node): boolean =>
  ts.canHaveModifiers(node) &&
  (ts.getModifiers(node) ?? []).some(({ kind }) => kind === ts.SyntaxKind.ExportKeyword);

function parse(file: string): ts.SourceFile {
  const text = readFileSync(file, 'utf8');
  return ts.createSourceFile(file, text, ts.ScriptTarget.Latest, true, ts.ScriptKind.TSX);
}

function visitAll(node: ts.Node, visit: (each: ts.Node) => void): void {
  visit(node);
  ts.forEachChild(node, (child) => visitAll(child, visit));
}

/** The guards called in a node, also through a constant of the same file, in their order; `unguarded` without any. */
function asked(node: ts.Node): string {
  const found: string[] = [];
  const followed = new Set<ts.Node>([node]);
  const visit = (each: ts.Node): void => {
    if (!ts.isCallExpression(each) || !ts.isIdentifier(each.expression)) return;
    const name = each.expression.text;
    const kind = GUARDS[name];
    if (kind !== undefined) found.push([kind, ...actionOf(each)].join(' '));
    const local = constantsOf(node.getSourceFile()).find((one) => one.name.getText() === name);
    if (local === undefined || followed.has(local)) return;
    followed.add(local);
    visitAll(local, visit);
  };
  visitAll(node, visit);
  return found.length === 0 ? 'unguarded' : found.join(', ');
}

const constantsOf = (source: ts.SourceFile): ts.VariableDeclaration[] =>
  source.statements
    .filter(ts.isVariableStatement)
    .flatMap(({ declarationList }) => declarationList.declarations);

/** The action that a guard is given: a text among its arguments, or `action` of an object among them. */
function actionOf(call: ts.CallExpression): string[] {
  return call.arguments.flatMap((argument) => {
    if (ts.isStringLiteral(argument)) return [argument.text];
    if (!ts.isObjectLiteralExpression(argument)) return [];
    return argument.properties
      .filter(ts.isPropertyAssignment)
      .filter((property) => property.name.getText() === 'action' && ts.isStringLiteral(property.initializer))
      .map((property) => (property.initializer as ts.StringLiteral).text);
  });
}

/** The names that a declaration gives; none where all of them refuse every request. */
function namesOf({ name, initializer }: ts.VariableDeclaration): string[] {
  if (!ts.isObjectBindingPattern(name)) return [name.getText()];
  const refusesAll =
    initializer !== undefined &&
    ts.isCallExpression(initializer) &&
    initializer.expression.getText() === 'otherMethods';
  return refusesAll ? [] : name.elements.map((element) => element.name.getText());
}

/** Every exported value of a module and the node that defines it. */
function exportsOf(source: ts.SourceFile): [string, ts.Node][] {
  const variables = source.statements
    .filter(ts.isVariableStatement)
    .flatMap((statement) =>
      statement.declarationList.declarations.flatMap((one) =>
        namesOf(one).map((name) => ({ name, one, statement })),
      ),
    );
  const exported: [string, ts.Node][] = variables
    .filter(({ statement }) => isExported(statement))
    .map(({ name, one }) => [name, one]);
  for (const statement of source.statements) {
    if (ts.isFunctionDeclaration(statement) && isExported(statement)) {
      exported.push([statement.name?.text ?? 'default', statement]);
    }
    if (ts.isExportAssignment(statement)) exported.push(['default', statement]);
    if (!ts.isExportDeclaration(statement)) continue;
    const clause = statement.exportClause;
    if (clause === undefined || !ts.isNamedExports(clause)) {
      exported.push([statement.getText(), statement]);
      continue;
    }
    for (const { name, propertyName } of clause.elements) {
      const local = variables.find((variable) => variable.name === (propertyName ?? name).getText());
      exported.push([name.getText(), local?.one ?? statement]);
    }
  }
  return exported;
}

export function declaredByRoute(file: string): Declared {
  const handlers = exportsOf(parse(file)).filter(([name]) => HTTP_METHODS.has(name));
  return Object.fromEntries(handlers.map(([name, node]) => [name, asked(node)]));
}

export function declaredByActions(file: string): Declared {
  return Object.fromEntries(exportsOf(parse(file)).map(([name, node]) => [name, asked(node)]));
}

export function declaredByPage(file: string): Declared {
  const page = parse(file).statements.find(
    (one): one is ts.FunctionDeclaration =>
      ts.isFunctionDeclaration(one) &&
      (ts.getModifiers(one) ?? []).some(({ kind }) => kind === ts.SyntaxKind.DefaultKeyword),
  );
  if (!page) throw new Error(`${file} has no default function`);
  return { page: asked(page) };
}

/** Whether the module is one of server actions. */
export function isActionModule(file: string): boolean {
  return isUseServer(parse(file).statements[0]);
}

/** Whether a function inside the module is a server action, which the table could not name. */
export function hasInlineAction(file: string): boolean {
  let found = false;
  visitAll(parse(file), (node) => {
    if (ts.isBlock(node) && node.statements.some(isUseServer)) found = true;
  });
  return found;
}
