import type { z } from 'zod';
import type { Fault } from './fault.ts';
import { Device, Receptor } from './schema.ts';

type Issue = z.core.$ZodIssue;

/** A path as people write it: `rooms[3].box.width`. */
export function placeOf(path: readonly PropertyKey[]): string {
  let place = '';
  for (const step of path)
    place += typeof step === 'number' ? `[${step}]` : place === '' ? String(step) : `.${String(step)}`;
  return place;
}

/** The value at a path, or undefined. */
function valueAt(root: unknown, path: readonly PropertyKey[]): unknown {
  let now: unknown = root;
  for (const step of path) {
    if (now === null || typeof now !== 'object' || !Object.hasOwn(now, step)) return undefined;
    now = (now as Record<PropertyKey, unknown>)[step];
  }
  return now;
}

/** A value in a few words. */
function shown(value: unknown): string {
  if (value === undefined) return 'nothing';
  if (typeof value === 'number') return String(value);
  const text = JSON.stringify(value) ?? String(value);
  return text.length > 60 ? `${text.slice(0, 57)}…` : text;
}

const KIND: { readonly [expected: string]: string } = {
  number: 'a number',
  int: 'a whole number',
  string: 'a text',
  boolean: 'true or false',
  array: 'a list',
  tuple: 'a list',
  object: 'an object',
};

function bound(issue: Issue & { code: 'too_small' | 'too_big' }, got: string): [string, string] {
  const small = issue.code === 'too_small';
  const limit = small ? issue.minimum : issue.maximum;
  const what =
    issue.origin === 'array' || issue.origin === 'set' ? 'entries' : issue.origin === 'string' ? 'characters' : '';
  const edge = small
    ? issue.inclusive === false
      ? 'more than'
      : 'at least'
    : issue.inclusive === false
      ? 'less than'
      : 'at most';
  if (what !== '') return [`must have ${edge} ${limit} ${what}`, small ? 'add what is missing' : 'take some out'];
  return [`must be ${edge} ${limit}, got ${got}`, `write a number that is ${edge} ${limit}`];
}

/** The kinds that an entry of a list may be of. */
function kindsAt([list]: readonly PropertyKey[]): string {
  const { options } = list === 'receptors' ? Receptor : Device;
  return options.map((option) => shown(option.shape.kind.value)).join(', ');
}

/** What is wrong where one of two fields must stand, and not both. */
function eitherWords(fields: unknown, value: unknown): [message: string, cure: string] {
  const [a, b] = fields as [string, string];
  return valueAt(value, [a]) === undefined
    ? [`needs a ${a} or ${article(b)} ${b}, and has neither`, 'add one of the two']
    : [`has both a ${a} and ${article(b)} ${b}`, 'keep one of the two'];
}

const article = (noun: string): string => (/^[aeiou]/u.test(noun) ? 'an' : 'a');

function words(issue: Issue, root: unknown): [code: string, message: string, cure: string] {
  const got = shown(valueAt(root, issue.path));
  switch (issue.code) {
    case 'invalid_type': {
      const kind = KIND[issue.expected] ?? `a ${issue.expected}`;
      return got === 'nothing'
        ? ['missing', `is missing; it must be ${kind}`, `write ${kind} here`]
        : ['wrong-type', `must be ${kind}, got ${got}`, `write ${kind} here`];
    }
    case 'too_small':
    case 'too_big': {
      const [message, cure] = bound(issue, got);
      return ['out-of-range', message, cure];
    }
    case 'invalid_value': {
      const choices = issue.values.map((v) => shown(v)).join(', ');
      return [
        'not-a-choice',
        `must be ${issue.values.length > 1 ? 'one of ' : ''}${choices}, got ${got}`,
        'choose one of these',
      ];
    }
    case 'invalid_format':
      return issue.message.startsWith('must be ')
        ? ['wrong-form', `${issue.message.split(', such as ')[0]}, got ${got}`, `write ${issue.message.slice(8)}`]
        : ['wrong-form', `is not of the right form, got ${got}`, 'see the schema (shadewright schema)'];
    case 'invalid_union':
      return issue.discriminator !== undefined
        ? ['not-a-choice', `must be one of ${kindsAt(issue.path)}, got ${got}`, 'choose one of these']
        : ['wrong-type', `fits none of the forms allowed here, got ${got}`, 'see the schema (shadewright schema)'];
    case 'custom':
      return [
        String(issue.params?.['code'] ?? 'contradiction'),
        ...eitherWords(issue.params?.['either'], valueAt(root, issue.path)),
      ];
    default:
      return ['invalid', issue.message, 'see the schema (shadewright schema)'];
  }
}

/** What a schema found, in our words, with its place. Unions are opened to the branch that came nearest. */
export function sayIssue(issue: Issue, root: unknown): Fault[] {
  if (issue.code === 'invalid_union' && issue.errors.length > 0) {
    const deep = [...issue.errors].sort((a, b) => (b[0]?.path.length ?? 0) - (a[0]?.path.length ?? 0))[0] ?? [];
    if ((deep[0]?.path.length ?? 0) > 0)
      return deep.flatMap((inner) => sayIssue({ ...inner, path: [...issue.path, ...inner.path] } as Issue, root));
  }
  const [code, message, cure] = words(issue, root);
  return [{ level: 'error', code, place: placeOf(issue.path), message, cure }];
}
