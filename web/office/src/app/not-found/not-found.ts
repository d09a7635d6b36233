import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink } from '@angular/router';
import { Empty } from '#ui/empty';
import { PageHeader } from '#ui/page-header';

@Component({
  selector: 'kb-not-found',
  imports: [Empty, PageHeader, RouterLink],
  template: `
    <div class="kb-page">
      <kb-page-header heading="There is no such page" />
      <kb-empty heading="The address may be old, or the page is not for your role."><a routerLink="/">Go to your first page</a></kb-empty>
    </div>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NotFound {}
