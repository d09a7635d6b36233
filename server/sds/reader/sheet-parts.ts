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
