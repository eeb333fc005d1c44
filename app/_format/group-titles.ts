/** What the groups of calculations are called on pages. */
import type { Group } from '@/lib/solvers/calculation';

export const groupTitles: Readonly<Record<Group, string>> = { lines: 'Lines', terminations: 'Terminations', networks: 'Networks' };
