import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { BrandMark } from '#ui/brand-mark';
import { ReaderLanguage } from './reader-language';

/** The frame of a page that opens from a link: the mark, the other language, the page. Nothing of the office. */
@Component({
  selector: 'kb-public-frame',
  imports: [BrandMark],
  template: `
    <header>
      <span class="brand"><kb-brand-mark />Kneeboard</span>
      @if (reader.language() === 'en') {
        <button type="button" class="kb-link kb-no-print" lang="es" (click)="reader.use('es')">Español</button>
      } @else {
        <button type="button" class="kb-link kb-no-print" lang="en" (click)="reader.use('en')">English</button>
      }
    </header>
    <main class="kb-stack"><ng-content /></main>
  `,
  styles: `
    :host {
      /* Opened on a phone at the floor, perhaps with gloves on: larger than in the office. */
      --kb-target: 3rem;

      display: block;
      max-width: 46rem;
      margin-inline: auto;
      padding: 0.75rem 1.125rem 2.5rem;
    }

    header {
      display: flex;
      align-items: center;
      justify-content: space-between;
      padding-bottom: 0.75rem;
    }

    .brand {
      display: inline-flex;
      gap: 8px;
      align-items: center;
      font-weight: 600;
    }

    header .kb-link {
      min-height: var(--kb-target);
    }

    @media print {
      :host {
        max-width: none;
        padding: 0;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PublicFrame {
  protected readonly reader = inject(ReaderLanguage);
}
