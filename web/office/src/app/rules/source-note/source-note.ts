import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { sourceLine, type Source } from '#compliance/source';

/** A source as people read it: citation, how it was verified, since when, and what was read. */
@Component({
  selector: 'kb-source-note',
  template: `
    <span>{{ line() }}</span>
    @if (source().inForceFrom; as since) {
      <span class="kb-quiet"> in force from {{ since }}</span>
    }
    @if (source().note; as note) {
      <span class="kb-quiet block">{{ note }}</span>
    }
  `,
  styles: '.block { display: block; }',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SourceNote {
  readonly source = input.required<Source>();
  protected readonly line = computed(() => sourceLine(this.source()));
}
