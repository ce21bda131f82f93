import { type z } from 'zod';
import { inputWords } from '@/lib/contracts/input-words';
import { AppError, type InputError } from '@/lib/errors';

/** The query of the schema's shape; each parameter once. Throws `invalid-input` naming the parameters that are wrong. */
export function readQuery<S extends z.ZodType>(request: Request, schema: S): z.output<S> {
  const { searchParams } = new URL(request.url);
  const names = [...searchParams.keys()];
  const repeated = names.find((name, at) => names.indexOf(name) !== at);
  if (repeated !== undefined) {
    throw parametersWrong([{ parameter: repeated, message: 'Give this parameter once.' }]);
  }
  const parsed = schema.safeParse(Object.fromEntries(searchParams), { error: inputWords });
  if (parsed.success) return parsed.data;
  throw parametersWrong(
    parsed.error.issues.flatMap((issue): InputError[] =>
      issue.code === 'unrecognized_keys'
        ? issue.keys.map((parameter) => ({ parameter, message: 'There is no such parameter here.' }))
        : [{ parameter: String(issue.path[0]), message: issue.message }],
    ),
  );
}

export function parametersWrong(errors: readonly InputError[]): AppError {
  const [first] = errors;
  const more = errors.length > 1 ? ` (and ${errors.length - 1} more)` : '';
  return new AppError('invalid-input', `${first?.parameter}: ${first?.message}${more}`, { errors });
}
