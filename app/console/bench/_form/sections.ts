/**
 * The form under legends. What is composite opens a section of its own; a required plain field joins the
 * section before it, as a length does its line; what may be left out gathers at the end.
 */
import { isComposite, type GroupField, type Member } from './field';

export interface Section {
  readonly legend: string;
  /** The composite that the legend names; drawn without a title of its own. */
  readonly head?: Member;
  readonly members: readonly Member[];
}

export function sectionsOf(form: GroupField): Section[] {
  const sections: { legend: string; head?: Member; members: Member[] }[] = [];
  const last: Member[] = [];
  for (const member of form.members) {
    const { field } = member;
    if (field.optional) {
      last.push(member);
    } else if (isComposite(field)) {
      sections.push({ legend: field.title, head: member, members: [] });
    } else {
      if (sections.length === 0) sections.push({ legend: 'Given', members: [] });
      sections[sections.length - 1].members.push(member);
    }
  }
  // Alone, an option needs no heading of its own kind.
  const composite = last.length === 1 && isComposite(last[0].field);
  if (last.length > 0) sections.push({ legend: composite ? last[0].field.title : 'Options', members: last });
  return sections;
}
