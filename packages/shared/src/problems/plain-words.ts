import type { z } from 'zod';

type Issue = z.core.$ZodRawIssue;

const nothing = (input: unknown): boolean => input === undefined || input === null || input === '';

function tooSmall(issue: Extract<Issue, { code: 'too_small' }>): string {
  const least = String(issue.minimum);
  if (issue.origin === 'string') {
    return nothing(issue.input) || issue.minimum === 1
      ? 'Fill this in'
      : `At least ${least} characters are needed`;
  }
  if (issue.origin === 'array' || issue.origin === 'set')
    return issue.minimum === 1 ? 'At least one is needed' : `At least ${least} are needed`;
  return issue.inclusive === false ? `It must be more than ${least}` : `It must be ${least} or more`;
}

function tooBig(issue: Extract<Issue, { code: 'too_big' }>): string {
  const most = String(issue.maximum);
  if (issue.origin === 'string') return `At most ${most} characters fit`;
  if (issue.origin === 'array' || issue.origin === 'set') return `At most ${most} fit`;
  return issue.inclusive === false ? `It must be less than ${most}` : `It must be ${most} or less`;
}

const FORMATS: Readonly<Record<string, string>> = {
  email: 'An e-mail address looks like name@example.org',
  url: 'A web address looks like https://example.org',
  uuid: 'This is not one of the things that can be chosen here',
  date: 'A day is written year-month-day, like 2026-07-04',
  time: 'A time is written like 07:30',
  datetime: 'A moment is written like 2026-07-04T06:30:00Z',
};

function wrongType(issue: Extract<Issue, { code: 'invalid_type' }>): string {
  if (nothing(issue.input)) return 'Fill this in';
  if (issue.expected === 'number' || issue.expected === 'int') return 'Give a number, like 2.4';
  return 'This is not of the kind that goes here';
}

/**
 * Plain words for what a schema found wrong, where the schema itself gives none: set once with
 * `z.config({ customError: plainWords })`, so both ends say the same. Undefined leaves the library's own words.
 */
export function plainWords(issue: Issue): string | undefined {
  switch (issue.code) {
    case 'too_small':
      return tooSmall(issue);
    case 'too_big':
      return tooBig(issue);
    case 'invalid_type':
      return wrongType(issue);
    case 'invalid_format':
      return nothing(issue.input) ? 'Fill this in' : FORMATS[issue.format];
    case 'invalid_value':
      return nothing(issue.input) ? 'Choose one' : 'This is not one of the things that can be chosen here';
    case 'unrecognized_keys':
      return `Not known here: ${issue.keys.join(', ')}`;
    default:
      return undefined;
  }
}
