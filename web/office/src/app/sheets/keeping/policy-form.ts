import { ChangeDetectionStrategy, Component, computed, inject, output, signal } from '@angular/core';
import { firstValueFrom } from 'rxjs';
import { Note } from '#ui/note';
import { problemOf, problemWords } from '#ui/problem';
import { Access } from '../../contract/access';
import { LibraryApi } from '../library-api';

/** The organisation's own limit of age for a sheet; policy, not law. */
@Component({
  selector: 'kb-policy-form',
  imports: [Note],
  template: `
    <h2>When a sheet counts as old</h2>
    @if (years() !== undefined) {
      <p>
        @if (mayChange()) {
          <label for="review-years">Ask again after</label>
          <select id="review-years" class="kb-field" [disabled]="isSending()" (change)="save($any($event.target).value)">
            <option value="" [selected]="years() === null">no limit</option>
            @for (choice of choices; track choice) {
              <option [value]="choice" [selected]="years() === choice">{{ choice }} {{ choice === 1 ? 'year' : 'years' }}</option>
            }
          </select>
        } @else {
          {{ years() === null ? 'No limit is set.' : 'Ask again after ' + years() + (years() === 1 ? ' year.' : ' years.') }}
        }
        <span class="kb-quiet">Your own limit, not law: 29 CFR 1910.1200 sets no age at which a sheet ends.</span>
      </p>
      @if (isSaved()) {
        <p role="status" class="kb-quiet">Saved.</p>
      }
    }
    @if (trouble()) {
      <kb-note kind="stop" [announce]="true">{{ trouble() }} <button type="button" class="kb-link" (click)="load()">Read it again</button></kb-note>
    }
  `,
  styles: `
    p {
      display: flex;
      flex-wrap: wrap;
      gap: 0.5rem 0.75rem;
      align-items: center;
      margin-top: 0.5rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PolicyForm {
  private readonly api = inject(LibraryApi);
  private readonly access = inject(Access);

  readonly saved = output<void>();

  protected readonly choices = [1, 2, 3, 4, 5, 6, 7, 8, 9, 10] as const;
  /** Undefined until it is known. */
  protected readonly years = signal<number | null | undefined>(undefined);
  protected readonly mayChange = computed(() => this.access.may('setLibraryPolicy'));
  protected readonly isSending = signal(false);
  protected readonly isSaved = signal(false);
  protected readonly trouble = signal('');

  constructor() {
    void this.load();
  }

  protected async load(): Promise<void> {
    this.trouble.set('');
    try {
      this.years.set((await firstValueFrom(this.api.policy())).reviewAfterYears);
    } catch (error) {
      this.trouble.set(problemWords(problemOf(error)));
    }
  }

  protected async save(choice: string): Promise<void> {
    this.isSending.set(true);
    this.isSaved.set(false);
    this.trouble.set('');
    try {
      this.years.set((await firstValueFrom(this.api.setPolicy({ reviewAfterYears: choice === '' ? null : Number(choice) }))).reviewAfterYears);
      this.isSaved.set(true);
      this.saved.emit();
    } catch (error) {
      this.trouble.set(problemWords(problemOf(error)));
    } finally {
      this.isSending.set(false);
    }
  }
}
