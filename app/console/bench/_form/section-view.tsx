'use client';

import { FieldView } from './field-view';
import type { Field } from './field';
import { GroupControl } from './group-control';
import { Members } from './members';
import type { Section } from './sections';
import { UnionControl } from './union-control';

/** A legend with a rule that runs on from it. */
export function SectionView({ section }: { readonly section: Section }) {
  const { legend, head, members } = section;
  return (
    <fieldset className="min-w-0 border-t border-rule pt-3.5">
      <legend className="pr-2.5 text-[14px] font-semibold">{legend}</legend>
      {head && <Head field={head.field} path={`input.members.${head.name}`} />}
      {members.length > 0 && <Members members={members} path="input.members" className={head ? 'mt-4' : ''} />}
    </fieldset>
  );
}

/** The legend has named it. */
function Head({ field, path }: { readonly field: Field; readonly path: string }) {
  if (field.kind === 'union') return <UnionControl field={field} path={path} bare />;
  if (field.kind === 'group') return <GroupControl field={field} path={path} bare />;
  return <FieldView field={field} path={path} labelHidden />;
}
