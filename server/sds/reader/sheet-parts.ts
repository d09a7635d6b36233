import { type SectionRole } from './headings.data';
import { type Line } from './lines';
import { type Sections } from './sections';

/** What the field readers look at: the sections, all lines in reading order, and the running headers and footers. */
export interface SheetParts {
  sections: Sections;
  lines: Line[];
  running: Line[];
  pages: number;
  language: string;
}

/** Half of the sixteen: with them found, a section at the end of the sheet stands there by its maker's choice. */
const enoughHeadings = 8;
/** More lines than this up to the end of the sheet hold other sections too, whose headings were not found. */
const longestOpenEnd = 60;

/**
 * The lines of a section; none when it runs on to the end of a long sheet: then codes and numbers of other sections, of
 * ingredients, of the glossary, would be taken for its own.
 */
export function closedBody({ sections, lines }: SheetParts, role: SectionRole): Line[] {
  const body = sections.bodies.get(role) ?? [];
  const isOpen = sections.headings.length < enoughHeadings && body.length > longestOpenEnd && body.at(-1) === lines.at(-1);
  return isOpen ? [] : body;
}
