import { ChangeDetectionStrategy, Component, ElementRef, inject, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { Note } from '#ui/note';
import { State } from '#ui/state';
import { ruleWords, sourceWords } from '../corrections/correction-words';
import { type ReviewProgress } from './review-progress';
import { type ReviewKey, type ReviewRow, type Suggestion } from './review-rows';
import { type SheetForm } from './sheet-form';
import { ValueEditor } from './value-editor';

/** What was read, line by line. The active line is open; one that wants a look asks "matches or change". */
@Component({
  selector: 'kb-review-list',
  imports: [MatButton, Note, RouterLink, State, ValueEditor],
  templateUrl: './review-list.html',
  styleUrl: './review-list.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ReviewList {
  private readonly element = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;

  readonly rows = input.required<readonly ReviewRow[]>();
  readonly form = input.required<SheetForm>();
  readonly progress = input.required<ReviewProgress>();
  readonly mayChange = input(false);
  /** Every line is a field to fill in. */
  readonly isByHand = input(false);
  readonly opened = output<ReviewKey>();
  readonly matched = output<ReviewKey>();
  readonly changeAsked = output<ReviewKey>();
  readonly taken = output<Suggestion>();

  protected readonly ruleWords = ruleWords;
  protected readonly sourceWords = sourceWords;

  focusActive(): void {
    this.element.querySelector<HTMLElement>('[data-active]')?.focus();
  }

  focusEditor(): void {
    this.element.querySelector<HTMLElement>('kb-value-editor input, kb-value-editor select, kb-value-editor textarea, kb-value-editor button')?.focus();
  }

  /** Enter in a one-line field ends the change; in a longer text it is a line break. */
  protected finish(event: Event, key: ReviewKey): void {
    if (this.isByHand() || !(event.target instanceof HTMLInputElement)) return;
    event.preventDefault();
    event.stopPropagation();
    this.matched.emit(key);
  }

  protected pageWords({ place }: ReviewRow): string {
    return place ? `page ${place.page}` : '';
  }

  protected state(row: ReviewRow): { readonly kind: 'done' | 'caution' | 'plain'; readonly words: string } {
    if (this.progress().isLookedAt(row.key)) return { kind: 'done', words: 'looked at' };
    if (row.wantsLook) return { kind: 'caution', words: 'look' };
    return row.place === null && row.key !== 'sections' ? { kind: 'plain', words: 'entered' } : { kind: 'done', words: 'read' };
  }
}
