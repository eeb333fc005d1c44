'use client';

import { CheckboxField } from '@/app/_components/checkbox-field';
import { useControl, type ControlProps } from './control';
import type { GroupField } from './field';
import { Members } from './members';

interface GroupControlProps extends ControlProps<GroupField> {
  /** Its title stands elsewhere already: in a legend, or as the choice that led here. */
  readonly bare?: boolean;
}

export function GroupControl({ bare = false, ...props }: GroupControlProps) {
  const { field, path, className = '' } = props;
  const { bound, error } = useControl(props);
  const { value: present, onChange, ...rest } = bound;
  const members = <Members members={field.members} path={`${path}.members`} />;
  const complaint = error && (
    <p role="alert" className="mb-2 text-fine text-garnet">
      {error}
    </p>
  );
  if (field.optional) {
    return (
      <div className={className}>
        <CheckboxField {...rest} checked={Boolean(present)} onChange={(event) => onChange(event.target.checked)} label={field.title} error={error} aria-description={field.description} />
        {present && <div className="mt-3 border-l border-rule pl-3.5">{members}</div>}
      </div>
    );
  }
  if (bare) {
    return (
      <div className={className}>
        {complaint}
        {members}
      </div>
    );
  }
  return (
    <div role="group" aria-label={field.title} className={className}>
      <p className="mb-[5px] text-small font-[550]">{field.title}</p>
      {complaint}
      <div className="border-l border-rule pl-3.5">{members}</div>
    </div>
  );
}
