import ts from 'typescript';

export interface Mutant {
  readonly id: number;
  readonly file: string;
  readonly line: number;
  /** The source line it begins on, without its indent: tells it from others of the same code. */
  readonly within: string;
  readonly code: string;
  /** The same piece of code as the mutant has it. */
  readonly mutated: string;
}

const K = ts.SyntaxKind;

/** Operator, the call that plays it, and what it is turned into. */
const BINARY = new Map<ts.SyntaxKind, readonly [call: string, ...others: string[]]>([
  [K.PlusToken, ['add', '-']],
  [K.MinusToken, ['subtract', '+']],
  [K.AsteriskToken, ['multiply', '/']],
  [K.SlashToken, ['divide', '*']],
  [K.PercentToken, ['remainder', '*']],
  [K.LessThanToken, ['less', '<=', '>=']],
  [K.LessThanEqualsToken, ['lessOrEqual', '<', '>']],
  [K.GreaterThanToken, ['greater', '>=', '<=']],
  [K.GreaterThanEqualsToken, ['greaterOrEqual', '>', '<']],
  [K.EqualsEqualsEqualsToken, ['same', '!==']],
  [K.ExclamationEqualsEqualsToken, ['different', '===']],
  [K.AmpersandAmpersandToken, ['and', '||']],
  [K.BarBarToken, ['or', '&&']],
]);

const ASSIGNMENT = new Map<ts.SyntaxKind, ts.SyntaxKind>([
  [K.PlusEqualsToken, K.PlusToken],
  [K.MinusEqualsToken, K.MinusToken],
  [K.AsteriskEqualsToken, K.AsteriskToken],
  [K.SlashEqualsToken, K.SlashToken],
]);

const MATH = new Map([
  ['Math.min', 'Math.max'],
  ['Math.max', 'Math.min'],
  ['Math.floor', 'Math.ceil'],
  ['Math.ceil', 'Math.floor'],
]);

/** Words for people: a change in them is a change of wording. */
const WORDED = new Set(['text', 'title', 'label', 'pages', 'note', 'sentence']);

/** Guards against a double's last bits are far smaller than anything of interest. */
const ROUNDING_GUARD = 1e-6;

/**
 * What a constant is turned into: 0 ↔ 1; a rounding guard a million times larger; any other 1 % larger, a whole number by
 * one at least, or the one before where it indexes a list.
 */
function otherConstant(value: number, isIndex: boolean): number {
  if (value === 0) return 1;
  if (value === 1) return 0;
  if (isIndex) return value - 1;
  if (Number.isInteger(value)) return value + Math.ceil(value / 100);
  return value <= ROUNDING_GUARD ? value * 1e6 : value * 1.01;
}

/** Whether a piece of code only makes words, or only makes types. */
function isPassedOver(node: ts.Node): boolean {
  if (ts.isTypeNode(node) || ts.isTemplateExpression(node) || ts.isImportDeclaration(node)) return true;
  if (ts.isInterfaceDeclaration(node) || ts.isTypeAliasDeclaration(node)) return true;
  if (ts.isNewExpression(node) && node.expression.getText() === 'DomainError') return true;
  return ts.isPropertyAssignment(node) && WORDED.has(node.name.getText());
}

/** A generator or an async function cannot pause inside the function an operand is put into. */
const pauses = (node: ts.Node): boolean =>
  ts.isYieldExpression(node) ||
  ts.isAwaitExpression(node) ||
  (ts.forEachChild(node, (child) => pauses(child) || undefined) ?? false);

/**
 * The places of a source file that can be changed, and its code with a switch in each of them.
 * @param firstId number of the file's first mutant
 */
export function findMutants(
  source: ts.SourceFile,
  file: string,
  checker: ts.TypeChecker,
  firstId: number,
): { mutants: Mutant[]; code: string } {
  const mutants: Mutant[] = [];
  const isNumber = (node: ts.Expression): boolean =>
    (checker.getTypeAtLocation(node).flags & ts.TypeFlags.NumberLike) !== 0;

  const lines = source.text.split('\n');
  const note = (node: ts.Node, mutated: string): number => {
    const id = firstId + mutants.length;
    const line = source.getLineAndCharacterOfPosition(node.getStart(source)).line;
    const within = lines[line]!.trim();
    mutants.push({
      id,
      file,
      line: line + 1,
      within,
      code: flat(node.getText(source)),
      mutated: flat(mutated),
    });
    return id;
  };

  const transformer: ts.TransformerFactory<ts.SourceFile> = (context) => {
    const { factory } = context;
    const play = (name: string, id: number, ...given: ts.Expression[]) =>
      factory.createCallExpression(
        factory.createPropertyAccessExpression(factory.createIdentifier('mutation_'), name),
        undefined,
        [factory.createNumericLiteral(id), ...given],
      );
    const visitAll = <T extends ts.Node>(node: T): T => ts.visitEachChild(node, visit, context);

    const binary = (node: ts.BinaryExpression): ts.Expression | undefined => {
      const arithmetic = ASSIGNMENT.get(node.operatorToken.kind) ?? node.operatorToken.kind;
      const found = BINARY.get(arithmetic);
      if (!found) return undefined;
      const [call, ...others] = found;
      const assigns = arithmetic !== node.operatorToken.kind;
      if (arithmetic === K.PlusToken && !(isNumber(node.left) && isNumber(node.right))) return undefined;
      if (assigns && (ts.isForStatement(node.parent) || !isPlainTarget(node.left))) return undefined;
      const lazy = call === 'and' || call === 'or';
      if (lazy && pauses(node.right)) return undefined;
      const sign = assigns ? '=' : '';
      const ids = others.map((other) =>
        note(node, `${node.left.getText(source)} ${other}${sign} ${node.right.getText(source)}`),
      );
      const left = ts.visitNode(node.left, visit) as ts.Expression;
      const right = ts.visitNode(node.right, visit) as ts.Expression;
      const second = lazy
        ? factory.createArrowFunction(
            undefined,
            undefined,
            [],
            undefined,
            undefined,
            factory.createParenthesizedExpression(right),
          )
        : right;
      const played = play(call, ids[0]!, left, second);
      return assigns ? factory.createAssignment(left, played) : played;
    };

    const visit = (node: ts.Node): ts.Node => {
      if (isPassedOver(node)) return node;
      if (ts.isBinaryExpression(node)) return binary(node) ?? visitAll(node);
      if (
        ts.isPrefixUnaryExpression(node) &&
        (node.operator === K.MinusToken || node.operator === K.ExclamationToken)
      ) {
        const id = note(node, node.operand.getText(source));
        return play(
          node.operator === K.MinusToken ? 'negative' : 'not',
          id,
          ts.visitNode(node.operand, visit) as ts.Expression,
        );
      }
      if (ts.isPropertyAccessExpression(node)) {
        const other = MATH.get(node.getText(source));
        if (other === undefined) return visitAll(node);
        const [owner, name] = other.split('.') as [string, string];
        return play(
          'either',
          note(node, other),
          node,
          factory.createPropertyAccessExpression(factory.createIdentifier(owner), name),
        );
      }
      if (ts.isNumericLiteral(node) && !(ts.isPropertyAssignment(node.parent) && node.parent.name === node)) {
        const value = Number(node.text.replaceAll('_', ''));
        const other = otherConstant(
          value,
          ts.isElementAccessExpression(node.parent) && node.parent.argumentExpression === node,
        );
        return play('constant', note(node, String(other)), node, factory.createNumericLiteral(other));
      }
      return visitAll(node);
    };
    return (root) => visitAll(root);
  };

  const { transformed } = ts.transform(source, [transformer]);
  const printed = ts.createPrinter().printFile(transformed[0]!);
  return { mutants, code: `import * as mutation_ from '@/tests/mutation/switch';\n${printed}` };
}

const flat = (code: string): string => code.replace(/\s+/g, ' ');

/** A target that may be read and written without doing anything twice. */
function isPlainTarget(node: ts.Expression): boolean {
  if (ts.isIdentifier(node) || node.kind === K.ThisKeyword || ts.isNumericLiteral(node)) return true;
  if (ts.isPropertyAccessExpression(node) || ts.isNonNullExpression(node))
    return isPlainTarget(node.expression);
  if (ts.isElementAccessExpression(node))
    return isPlainTarget(node.expression) && isPureIndex(node.argumentExpression);
  return false;
}

function isPureIndex(node: ts.Expression): boolean {
  if (ts.isBinaryExpression(node)) return isPureIndex(node.left) && isPureIndex(node.right);
  return isPlainTarget(node);
}
