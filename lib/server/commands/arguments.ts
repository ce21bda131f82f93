import { type z } from 'zod';
import { AppError } from '@/lib/errors';

/** Ends a command with one line on standard error; the stack only for what is a fault of ours. */
export function fail(error: unknown): never {
  const plain = error instanceof AppError || (error instanceof Error && error.name === 'Error');
  console.error(plain ? error.message : error);
  process.exit(1);
}

/** One argument of a command, by its schema. Throws naming it, with how the command is called. */
export function parseArgument<S extends z.ZodType>(
  name: string,
  schema: S,
  value: unknown,
  usage: string,
): z.output<S> {
  const parsed = schema.safeParse(value);
  if (parsed.success) return parsed.data;
  const reason = parsed.error.issues.map((issue) => issue.message).join(' ');
  throw new Error(`${name}: ${reason}\nUsage: ${usage}`);
}
