import type { z } from 'zod';

/** What a person reads beside a field when the schema has no sentence of its own for what is wrong. */
export function issueWords(issue: z.core.$ZodRawIssue): string {
  switch (issue.code) {
    case 'invalid_type':
      return issue.input === undefined || issue.input === null ? 'This is needed.' : typeWords(issue.expected);
    case 'invalid_value':
      return choiceWords(issue.values);
    case 'too_small':
      return boundWords(issue.origin, issue.minimum, 'At least');
    case 'too_big':
      return boundWords(issue.origin, issue.maximum, 'At most');
    case 'invalid_union':
      return issue.input === undefined || issue.input === null ? 'This is needed.' : 'This is none of the choices.';
    case 'unrecognized_keys':
      return 'This field is not known here.';
    default:
      return 'This is not right.';
  }
}

function typeWords(expected: string): string {
  if (expected === 'number' || expected === 'int') return 'Give a number.';
  if (expected === 'string') return 'Give words.';
  if (expected === 'boolean') return 'Say yes or no.';
  if (expected === 'array') return 'Give a list.';
  return 'This is not right.';
}

function choiceWords(values: readonly unknown[]): string {
  const words = values.filter((value) => typeof value === 'string');
  return words.length > 0 && words.length <= 8 ? `Choose one of: ${words.join(', ')}.` : 'Choose one from the list.';
}

function boundWords(origin: string, bound: number | bigint, start: string): string {
  if (origin === 'string') return bound === 1 ? 'This is needed.' : `${start} ${bound} characters.`;
  return `${start} ${bound}.`;
}
