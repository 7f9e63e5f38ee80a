/** The project's own source files and what they import, read with the TypeScript compiler's parser. */
import { existsSync, readFileSync, readdirSync, statSync } from "node:fs";
import path from "node:path";
import ts from "typescript";

export const ROOT = path.resolve(import.meta.dirname, "../..");
export const SOURCE_FOLDERS = ["app", "components", "fonts", "iso", "lib", "migrations", "models", "pdf", "scripts", "tests"];

export interface Import {
  readonly text: string;
  /** Path from the root, or null for a package. */
  readonly target: string | null;
  readonly typeOnly: boolean;
}

export interface SourceFile {
  /** Path from the root. */
  readonly file: string;
  readonly text: string;
  readonly imports: readonly Import[];
  readonly hasDefaultExport: boolean;
}

function filesUnder(folder: string): string[] {
  return readdirSync(folder).flatMap((name) => {
    const place = path.join(folder, name);
    return statSync(place).isDirectory() ? filesUnder(place) : [place];
  });
}

/** Every TypeScript and JavaScript file of ours. */
export function sourceFiles(): SourceFile[] {
  const top = readdirSync(ROOT).filter((name) => statSync(path.join(ROOT, name)).isFile());
  return [...top.map((name) => path.join(ROOT, name)), ...SOURCE_FOLDERS.filter((name) => existsSync(path.join(ROOT, name))).flatMap((name) => filesUnder(path.join(ROOT, name)))]
    .filter((file) => /\.(ts|tsx|mts|mjs)$/.test(file) && !/\.d\.m?ts$/.test(file))
    .map((file) => readSource(file));
}

function readSource(file: string): SourceFile {
  const text = readFileSync(file, "utf8");
  const parsed = ts.createSourceFile(file, text, ts.ScriptTarget.Latest, true, file.endsWith("x") ? ts.ScriptKind.TSX : undefined);
  const found: { text: string; typeOnly: boolean }[] = [];
  let hasDefaultExport = false;
  const visit = (node: ts.Node): void => {
    const specifier = specifierOf(node);
    if (specifier) found.push(specifier);
    if (isDefaultExport(node)) hasDefaultExport = true;
    ts.forEachChild(node, visit);
  };
  visit(parsed);
  const imports = found.map(({ text: wanted, typeOnly }) => ({ text: wanted, typeOnly, target: resolve(wanted, file) }));
  return { file: path.relative(ROOT, file), text, imports, hasDefaultExport };
}

function specifierOf(node: ts.Node): { text: string; typeOnly: boolean } | null {
  if (ts.isImportDeclaration(node) && ts.isStringLiteral(node.moduleSpecifier)) {
    return { text: node.moduleSpecifier.text, typeOnly: isTypeOnlyImport(node) };
  }
  if (ts.isExportDeclaration(node) && node.moduleSpecifier && ts.isStringLiteral(node.moduleSpecifier)) {
    return { text: node.moduleSpecifier.text, typeOnly: node.isTypeOnly };
  }
  if (ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword) {
    const wanted = node.arguments[0];
    return wanted && ts.isStringLiteralLike(wanted) ? { text: wanted.text, typeOnly: false } : null;
  }
  if (ts.isImportTypeNode(node) && ts.isLiteralTypeNode(node.argument) && ts.isStringLiteral(node.argument.literal)) {
    return { text: node.argument.literal.text, typeOnly: true };
  }
  return null;
}

function isTypeOnlyImport(node: ts.ImportDeclaration): boolean {
  const clause = node.importClause;
  if (!clause) return false;
  if (clause.isTypeOnly) return true;
  const named = clause.namedBindings;
  return !clause.name && named !== undefined && ts.isNamedImports(named) && named.elements.every((element) => element.isTypeOnly);
}

function isDefaultExport(node: ts.Node): boolean {
  if (ts.isExportAssignment(node)) return true;
  if (ts.isExportSpecifier(node)) return node.name.text === "default";
  return ts.canHaveModifiers(node) && (ts.getModifiers(node) ?? []).some((modifier) => modifier.kind === ts.SyntaxKind.DefaultKeyword);
}

function resolve(wanted: string, from: string): string | null {
  const base = wanted.startsWith("@/") ? path.join(ROOT, wanted.slice(2)) : wanted.startsWith(".") ? path.resolve(path.dirname(from), wanted) : null;
  if (base === null) return null;
  const endings = ["", ".ts", ".tsx", ".mts", ".mjs", "/index.ts", "/index.tsx"];
  const hit = endings.map((ending) => base + ending).find((place) => existsSync(place) && statSync(place).isFile());
  return path.relative(ROOT, hit ?? base);
}
