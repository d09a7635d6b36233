import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { type ChecklistText } from '#compliance';
import { Mark } from '#ui/mark';
import { QrCode } from '../../pieces/qr-code';
import { paperGroups } from './paper-groups';
import { PAPER_WORDS } from './paper-words';

/** The published list on paper: ticked and signed by hand when no tablet serves. Set from the bytes on record and nothing else. */
@Component({
  selector: 'kb-paper-list',
  imports: [Mark, QrCode],
  templateUrl: './paper-list.html',
  styleUrl: './paper-list.scss',
  host: { '[attr.lang]': 'text().language' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PaperList {
  readonly text = input.required<ChecklistText>();
  readonly versionNumber = input.required<number>();
  /** Of the bytes on record, hex. */
  readonly sha256 = input.required<string>();
  /** Where this very list opens: whoever finds the paper finds its version. */
  readonly address = input.required<string>();

  protected readonly words = computed(() => PAPER_WORDS[this.text().language]);
  protected readonly day = computed(() => new Intl.DateTimeFormat(this.text().language === 'es' ? 'es-US' : 'en-GB', { dateStyle: 'full', timeZone: 'UTC' }).format(new Date(`${this.text().date}T00:00:00Z`)));
  protected readonly held = computed(() => this.text().tasks.filter(({ heldBecause }) => heldBecause !== null));
  protected readonly groups = computed(() => {
    const { morning, controls, protection } = paperGroups(this.text());
    const say = this.words();
    return [
      { heading: say.morning, rows: morning, hasTasks: false },
      { heading: say.controls, rows: controls, hasTasks: true },
      { heading: say.protection, rows: protection, hasTasks: true },
    ].filter(({ rows }) => rows.length > 0);
  });
  protected readonly shortSha = computed(() => this.sha256().slice(0, 16).replace(/(.{4})(?=.)/g, '$1 '));
  /** Room for who joins during the day. */
  protected readonly blanks = [1, 2] as const;
}
