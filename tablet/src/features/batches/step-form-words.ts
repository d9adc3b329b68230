import type { z } from 'zod';

/** What a run sheet refuses, in words for whoever edits one by hand; the schema itself speaks to devices. */
export function plainWords(issue: z.core.$ZodRawIssue): string | undefined {
  const field = issue.path?.at(-1);
  const isTemp = field === 'tempC';
  switch (issue.code) {
    case 'invalid_type':
      return issue.expected === 'number' ? 'Type a number.' : undefined;
    case 'too_small':
      if (issue.origin === 'string') return field === 'title' ? 'Say what to do, verb first.' : 'Give it a name.';
      return isTemp ? 'From −5 °C up.' : 'Above 0.';
    case 'too_big':
      if (issue.origin === 'string') return `Use ${issue.maximum} characters or fewer.`;
      if (isTemp) return 'At most 105 °C.';
      return field === 'massG' ? 'At most 100 kg.' : 'At most 14 days.';
    default:
      return undefined;
  }
}
