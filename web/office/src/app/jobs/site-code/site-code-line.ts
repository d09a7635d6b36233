import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { State } from '#ui/state';
import { Access } from '../../contract/access';
import { momentShort } from '../../pieces/dates';
import { SiteCodeApi } from './site-code-api';

/** On the job's page: whether a printed code opens its sheets, and the way to it. */
@Component({
  selector: 'kb-site-code-line',
  imports: [RouterLink, State],
  template: `
    @if (mayRead()) {
      <section class="kb-stack" aria-labelledby="site-code-heading">
        <h2 id="site-code-heading">Site code</h2>
        <ul class="kb-rows" style="--kb-columns: minmax(12rem, 1fr) auto 8rem">
          <li>
            <span>Printed on site, it opens all sheets and the plan of the day without an account.</span>
            @if (code.hasValue()) {
              @if (code.value().isOn) {
                <kb-state kind="done">in use since {{ madeAt() }}</kb-state>
              } @else {
                <kb-state kind="plain">none in use</kb-state>
              }
            } @else if (code.error()) {
              <kb-state kind="caution">could not be read</kb-state>
            } @else {
              <span class="kb-quiet">looking …</span>
            }
            <a [routerLink]="['/jobs', jobId(), 'site-code']">{{ mayMake() ? 'Make or change' : 'Look' }}<span class="kb-visually-hidden"> the site code</span></a>
          </li>
        </ul>
      </section>
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SiteCodeLine {
  private readonly access = inject(Access);

  readonly jobId = input.required<string>();

  protected readonly mayRead = computed(() => this.access.may('readSiteCode'));
  protected readonly mayMake = computed(() => this.access.may('makeSiteCode'));
  protected readonly code = inject(SiteCodeApi).codeResource(computed(() => (this.mayRead() ? this.jobId() : undefined)));
  protected readonly madeAt = computed(() => (this.code.hasValue() ? momentShort(this.code.value().madeAt ?? new Date().toISOString()) : ''));
}
