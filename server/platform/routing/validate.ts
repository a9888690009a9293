import type { z } from 'zod';
import { invalidRequest, type RequestFault } from '../problem';

/** `items`, 0, `name` → `items[0].name`; only what stands outside of the body says where. */
function pathText(root: string, path: readonly PropertyKey[]): string {
  const start = root === 'body' && path.length > 0 ? '' : root;
  return path.reduce<string>((text, part) => {
    if (typeof part === 'number') return `${text}[${part}]`;
    return text === '' ? String(part) : `${text}.${String(part)}`;
  }, start);
}

/**
 * Reads parts of a request by their schemas, all of them before complaining about any.
 *
 * @throws Problem invalid-request with every fault
 */
export function readParts<Name extends string>(
  parts: Readonly<Record<Name, { schema: z.ZodType | undefined; value: unknown }>>,
): Record<Name, unknown> {
  const faults: RequestFault[] = [];
  const values: Partial<Record<Name, unknown>> = {};
  for (const name in parts) {
    const { schema, value } = parts[name];
    if (schema === undefined) {
      values[name] = undefined;
      continue;
    }
    const parsed = schema.safeParse(value);
    if (parsed.success) values[name] = parsed.data;
    else {
      faults.push(
        ...parsed.error.issues.map(({ path, message }) => ({ path: pathText(name, path), message })),
      );
    }
  }
  if (faults.length > 0) throw invalidRequest(faults);
  return values as Record<Name, unknown>;
}
