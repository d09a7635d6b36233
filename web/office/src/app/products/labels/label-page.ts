import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { type ContainerLabel } from '#shared/library';
import { Note } from '#ui/note';
import { PageHeader } from '#ui/page-header';
import { Unready } from '../../pieces/unready';
import { labelResource } from './label-api';
import { labelSizes, layoutOf, papers } from './label-layout';
import { LabelSheet } from './label-sheet';

type State = 'dry' | 'mixing' | 'wet' | 'cured-being-ground';
const states: readonly { readonly value: State; readonly label: string }[] = [
  { value: 'mixing', label: 'being mixed' },
  { value: 'wet', label: 'mixed, wet' },
  { value: 'dry', label: 'dry powder' },
  { value: 'cured-being-ground', label: 'cured, being ground' },
];
/** As it came from its package: a decanted product is not mixed. */
const decanted = { en: 'decanted, not mixed', es: 'trasvasado, sin mezclar' } as const;

/** Labels for mixed and decanted containers. Without the sheet of every part nothing is printed. */
@Component({
  selector: 'kb-label-page',
  imports: [LabelSheet, MatButton, Note, PageHeader, RouterLink, Unready],
  templateUrl: './label-page.html',
  styleUrl: './label-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LabelPage {
  private readonly router = inject(Router);

  readonly kitId = input<string>();
  readonly productId = input<string>();
  /** Choices, from the address. */
  readonly state = input<State, string | undefined>('mixing', { transform: (value) => states.find((one) => one.value === value)?.value ?? 'mixing' });
  readonly size = input(labelSizes[0], { transform: (value: string | undefined) => labelSizes.find(({ id }) => id === value) ?? labelSizes[0] });
  readonly paper = input(papers[0], { transform: (value: string | undefined) => papers.find(({ id }) => id === value) ?? papers[0] });
  readonly color = input(true, { transform: (value: string | undefined) => value !== 'no' });

  protected readonly label = labelResource(this.kitId, this.productId, this.state);
  protected readonly fits = signal(true);
  protected readonly states = states;
  protected readonly sizes = labelSizes;
  protected readonly papers = papers;
  protected readonly backPath = computed(() => (this.kitId() ? ['/products/kits', this.kitId()] : ['/products', this.productId()]));
  protected readonly missing = computed(() => (this.label.hasValue() ? this.label.value().partsWithoutSheet : []));
  protected readonly stateWords = computed<ContainerLabel['state'] | null>(() => (this.kitId() && this.label.hasValue() ? this.label.value().state : decanted));
  protected readonly count = computed(() => {
    const [paper, size] = [this.paper(), this.size()];
    if (!paper || !size) return 0;
    const { columns, rows } = layoutOf(paper, size);
    return columns * rows;
  });

  protected choose(change: Readonly<Record<string, string>>): void {
    void this.router.navigate([], { queryParams: change, queryParamsHandling: 'merge', replaceUrl: true });
  }

  protected print(): void {
    window.print();
  }
}
