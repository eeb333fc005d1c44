'use client';

import { isShort, type Member } from './field';
import { FieldView } from './field-view';

interface MembersProps {
  readonly members: readonly Member[];
  readonly path: string;
  readonly className?: string;
}

/** Fields in two columns: short ones in pairs, a short one without a partner and all others across both. */
export function Members({ members, path, className = '' }: MembersProps) {
  const shown = members.filter(({ field }) => field.kind !== 'constant');
  const wide = new Set(widths(shown));
  return (
    <div className={`grid grid-cols-2 items-start gap-x-3 gap-y-4 ${className}`}>
      {shown.map(({ name, field }) => (
        <FieldView key={name} field={field} path={`${path}.${name}`} className={wide.has(name) ? 'col-span-2' : field.kind === 'boolean' ? 'self-center pt-4' : ''} />
      ))}
    </div>
  );
}

/** Names of the members that take both columns. */
function widths(members: readonly Member[]): string[] {
  const wide: string[] = [];
  let alone: string | null = null;
  for (const { name, field } of members) {
    if (isShort(field)) {
      alone = alone === null ? name : null;
      continue;
    }
    if (alone !== null) wide.push(alone);
    alone = null;
    wide.push(name);
  }
  return alone === null ? wide : [...wide, alone];
}
