import type { Rule } from '@mereward/shared/rules/contract';

type Template = Pick<Rule, 'text' | 'reason' | 'category' | 'severity'>;

/**
 * Rules many fisheries have, to begin with: the owner words them. Common practice, no published source; figures in them
 * are what is usual and are the owner's to set. What a byelaw says is the byelaw's and is not written here as a rule.
 */
export const RULE_TEMPLATES: readonly Template[] = [
  {
    text: 'Barbless hooks only.',
    reason: 'They come out with less harm.',
    category: 'tackle',
    severity: 'warn',
  },
  {
    text: 'For carp, main line of 12 lb or more.',
    reason: 'Lost fish trail line and lead.',
    category: 'tackle',
    severity: 'warn',
  },
  {
    text: 'No fixed leads: the lead must come off if the line breaks.',
    reason: 'A fish must not tow it.',
    category: 'tackle',
    severity: 'remove',
  },
  {
    text: 'A landing net of 36 in or more for carp.',
    reason: '',
    category: 'fish_welfare',
    severity: 'warn',
  },
  {
    text: 'Use a padded mat or cradle, wet, and never stand with a fish in your arms.',
    reason: '',
    category: 'fish_welfare',
    severity: 'warn',
  },
  {
    text: 'No keepnets or sacks, except in matches.',
    reason: '',
    category: 'fish_welfare',
    severity: 'remove',
  },
  {
    text: 'Dip nets, mats and slings in the tank and let them dry before you fish.',
    reason: 'Disease travels on wet nets.',
    category: 'fish_welfare',
    severity: 'remove',
  },
  { text: 'No braided main line.', reason: '', category: 'tackle', severity: 'warn' },
  { text: 'No bait boats.', reason: '', category: 'boats', severity: 'warn' },
  { text: 'No nuts, unless they are bought prepared.', reason: '', category: 'bait', severity: 'warn' },
  { text: 'Never leave a rod that is in the water.', reason: '', category: 'conduct', severity: 'remove' },
  { text: 'No fires.', reason: '', category: 'conduct', severity: 'remove' },
  { text: 'No radios or loud alarms.', reason: '', category: 'conduct', severity: 'warn' },
  { text: 'Bring a bag and take your litter home.', reason: '', category: 'conduct', severity: 'warn' },
];
