import { roles, roleWords } from '#workflows/revision';
import type { Role } from '#workflows/revision';

const details: Record<Role, string> = {
  designer: 'Writes briefs, models designs, submits revisions.',
  reviewer: 'Remarks on revisions, approves or asks for changes; never on own work.',
  bench: 'Runs tests, enters readings, signs results, keeps the instruments.',
  releaseAuthority: 'Weighs the evidence, grants concessions, releases and recalls.',
  administrator: 'People, mail and the audit trail.',
  observer: 'Reads what has been released.',
};

const capital = (words: string) => words.replace(/^./, (first) => first.toUpperCase());

export const roleChoices = roles.map((role) => ({
  value: role,
  label: capital(roleWords[role]),
  detail: details[role],
}));
