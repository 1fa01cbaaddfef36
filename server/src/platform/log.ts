/** One JSON line an entry on standard error; passwords, tokens and bodies are never given to it. */
export function log(
  level: 'info' | 'warning' | 'error',
  message: string,
  facts: Record<string, unknown> = {},
): void {
  process.stderr.write(`${JSON.stringify({ level, message, ...facts })}\n`);
}

/** What a log needs of an unknown error. */
export function errorFacts(error: unknown): Record<string, unknown> {
  return error instanceof Error ? { error: error.message, stack: error.stack } : { error: String(error) };
}
