import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { Router } from '@angular/router';
import { type ListedRow } from '#compliance/rules/registry';
import { State, type StateKind } from '#ui/state';
import { PageHeader } from '#ui/page-header';
import { SearchField } from '../../pieces/search-field';
import { SourceNote } from '../source-note/source-note';
import { duties, findRules, packViews, placeViews, ruleCount, tables, tableWords, unsure, type RuleFilter } from '../rules-view';
import { type ListedRule } from '#compliance/rule';
import { type AreaCoverage } from '#compliance/jurisdictions/packs.data';

const rowsShown = 40;
const areaStates: Readonly<Record<AreaCoverage['state'], { kind: StateKind; words: string }>> = {
  complete: { kind: 'done', words: 'held' },
  partial: { kind: 'caution', words: 'in part' },
  missing: { kind: 'stop', words: 'missing' },
};

/** Every rule, data table and pack with its source, straight from the data the program decides by. */
@Component({
  selector: 'kb-rules-page',
  imports: [PageHeader, SearchField, SourceNote, State],
  templateUrl: './rules-page.html',
  styleUrl: './rules-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RulesPage {
  private readonly router = inject(Router);

  /** Words looked for, from the address. */
  readonly q = input<string>();
  /** "unsure" shows only what was recalled or read in part. */
  readonly sure = input<string>();

  protected readonly filter = computed<RuleFilter>(() => (this.sure() === 'unsure' ? 'unsure' : 'all'));
  protected readonly rules = computed(() => findRules(this.q() ?? '', this.filter()));
  protected readonly ruleCount = ruleCount;
  protected readonly tables = tables;
  protected readonly packs = packViews;
  protected readonly places = placeViews;
  protected readonly areaStates = areaStates;
  protected readonly tableWords = tableWords;
  protected readonly waiting = duties.filter((duty) => duty.ruleIds.length === 0);

  protected look(q: string): void {
    this.go({ q: q || null });
  }
  protected show(filter: RuleFilter): void {
    this.go({ sure: filter === 'unsure' ? 'unsure' : null });
  }
  protected dutiesOf(rule: ListedRule): string {
    return rule.duties.map((id) => `${id} ${duties.find((duty) => duty.id === id)?.duty ?? ''}`.trim()).join('; ');
  }
  protected markOf({ source: { verified } }: ListedRule): { kind: StateKind; words: string } {
    if (unsure.has(verified)) return { kind: 'caution', words: 'check the text' };
    return verified === 'common-practice' ? { kind: 'plain', words: 'trade practice' } : { kind: 'done', words: verified === 'derived' ? 'derived' : 'source read' };
  }
  protected rowsOf(rows: readonly ListedRow[]): readonly ListedRow[] {
    return rows.slice(0, rowsShown);
  }

  private go(queryParams: Record<string, string | null>): void {
    void this.router.navigate([], { queryParams, queryParamsHandling: 'merge', replaceUrl: true });
  }
}
