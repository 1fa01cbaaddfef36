import type { FunctionNode, MathNode, OperatorNode } from 'mathjs';
import { create, parseDependencies } from 'mathjs/number';
import { FormulaError } from './formula-error';
import { checkEnd, scan, type Token } from './scan';
import {
  functions,
  isFunctionName,
  largestNodes,
  variable,
  vocabularyMend,
  type FunctionName,
} from './vocabulary';

/** The parser alone: all of mathjs would take a quarter of a second to load. */
const { parse } = create({ parseDependencies: parseDependencies! });

/** A limit as a function of frequency in GHz; may return a number that is not finite where it is undefined. */
export type Formula = (fGhz: number) => number;

/**
 * Reads a formula in `f` (GHz) into a function of our own: mathjs parses, its tree is walked node by node against a list
 * of what is allowed, and nothing of mathjs is ever evaluated. `log` is natural, `^` binds to the right and above the
 * sign (-2^2 = -4), products are always written.
 * @throws FormulaError saying where (character from 1), why and how to mend it
 */
export function readFormula(text: string): Formula {
  const tokens = scan(text);
  checkEnd(tokens);
  const reader: Reader = {
    calls: tokens.filter((token) => token.kind === 'function'),
    called: 0,
    nodes: 0,
    tokens,
  };
  return compile(parseText(text), reader);
}

interface Reader {
  readonly tokens: readonly Token[];
  /** The function names in the order of the text, which is the order in which the tree is walked. */
  readonly calls: readonly Token[];
  called: number;
  nodes: number;
}

function parseText(text: string): MathNode {
  try {
    // A line break would end an expression for mathjs; for people it is a space.
    return parse(text.replace(/\s/g, ' '));
  } catch (error) {
    const position = (error as { char?: unknown }).char;
    if (!(error instanceof Error) || typeof position !== 'number') throw error;
    const reason = error.message.replace(/\s*\(char \d+\)\s*$/, '');
    throw new FormulaError(reason, Math.min(position, text.length + 1), 'Correct the formula there.');
  }
}

function compile(node: MathNode, reader: Reader): Formula {
  reader.nodes += 1;
  if (reader.nodes > largestNodes) {
    throw new FormulaError(
      `The formula has more than ${largestNodes} terms`,
      1,
      'Split the range into more segments with shorter formulas.',
    );
  }
  switch (node.type) {
    case 'ConstantNode':
      return constant(node, reader);
    case 'SymbolNode':
      return symbol(node, reader);
    case 'ParenthesisNode':
      return compile((node as MathNode & { content: MathNode }).content, reader);
    case 'OperatorNode':
      return operator(node as OperatorNode, reader);
    case 'FunctionNode':
      return call(node as FunctionNode, reader);
    default:
      throw new FormulaError(
        `A ${node.type} has no place in a formula`,
        firstPosition(reader),
        vocabularyMend,
      );
  }
}

function firstPosition(reader: Reader): number {
  return reader.tokens[0]?.position ?? 1;
}

function constant(node: MathNode, reader: Reader): Formula {
  const value = (node as MathNode & { value: unknown }).value;
  if (typeof value === 'number' && Number.isFinite(value)) return () => value;
  const token = reader.tokens.find((one) => one.kind === 'number' && !Number.isFinite(Number(one.text)));
  throw new FormulaError(
    'A number is too large to compute with',
    token?.position ?? firstPosition(reader),
    'Write a smaller number.',
  );
}

function symbol(node: MathNode, reader: Reader): Formula {
  const name = (node as MathNode & { name: string }).name;
  if (name === variable) return (f) => f;
  throw new FormulaError(`"${name}" is not known`, firstPosition(reader), vocabularyMend);
}

function operator(node: OperatorNode, reader: Reader): Formula {
  const { op, args, implicit } = node as unknown as { op: string; args: MathNode[]; implicit: boolean };
  const [left, right] = [args[0], args[1]];
  if (left && !implicit && args.length === 1 && (op === '-' || op === '+')) {
    const of = compile(left, reader);
    return op === '-' ? (f) => -of(f) : of;
  }
  if (left && right && !implicit && args.length === 2) {
    const a = compile(left, reader);
    const b = compile(right, reader);
    const binary = binaryOf(op, a, b);
    if (binary) return binary;
  }
  throw new FormulaError(`The operator "${op}" has no place here`, firstPosition(reader), vocabularyMend);
}

function binaryOf(op: string, a: Formula, b: Formula): Formula | undefined {
  switch (op) {
    case '+':
      return (f) => a(f) + b(f);
    case '-':
      return (f) => a(f) - b(f);
    case '*':
      return (f) => a(f) * b(f);
    case '/':
      return (f) => a(f) / b(f);
    case '^':
      return (f) => a(f) ** b(f);
    default:
      return undefined;
  }
}

function call(node: FunctionNode, reader: Reader): Formula {
  const { fn, args } = node as unknown as { fn: MathNode & { name?: string }; args: MathNode[] };
  const token = reader.calls[reader.called];
  reader.called += 1;
  const position = token?.position ?? firstPosition(reader);
  const name = fn.name ?? '';
  if (fn.type !== 'SymbolNode' || !isFunctionName(name)) {
    throw new FormulaError(`"${name}" cannot be called`, position, vocabularyMend);
  }
  const { least, most } = functions[name];
  if (args.length < least || args.length > most) {
    const wanted = least === most ? `${least} argument` : `${least} to ${most} arguments`;
    throw new FormulaError(
      `${name} takes ${wanted}, not ${args.length}`,
      position,
      `Correct what stands in the brackets of ${name}.`,
    );
  }
  const of = args.map((argument) => compile(argument, reader));
  return functionOf(name, of);
}

function functionOf(name: FunctionName, args: readonly Formula[]): Formula {
  const a = args[0]!;
  switch (name) {
    case 'sqrt':
      return (f) => Math.sqrt(a(f));
    case 'log10':
      return (f) => Math.log10(a(f));
    case 'log':
      return (f) => Math.log(a(f));
    case 'exp':
      return (f) => Math.exp(a(f));
    case 'abs':
      return (f) => Math.abs(a(f));
    case 'min':
      return (f) => args.reduce((least, of) => Math.min(least, of(f)), Infinity);
    case 'max':
      return (f) => args.reduce((most, of) => Math.max(most, of(f)), -Infinity);
  }
}
