import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { Access } from '../contract/access';
import { ContractClient } from '../contract/contract-client';

/** Whole lists in and out: products as CSV, current sheets as a zip with an index. */
@Component({
  selector: 'kb-export-links',
  imports: [RouterLink],
  template: `
    <p class="kb-small">
      <span class="kb-quiet">Take along:</span>
      <a [href]="csvHref" download>product list (CSV)</a>
      <a [href]="zipHref" download>sheets in use (zip)</a>
      @if (mayImport()) {
        <a routerLink="/products/import">add a product list (CSV)</a>
      }
    </p>
  `,
  styles: `
    p {
      display: flex;
      flex-wrap: wrap;
      align-items: baseline;
      gap: 0.4rem 1.1rem;
    }

    a {
      padding-block: 3px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ExportLinks {
  private readonly client = inject(ContractClient);
  private readonly access = inject(Access);

  protected readonly csvHref = this.client.hrefOf('exportProductsCsv');
  protected readonly zipHref = this.client.hrefOf('exportSheetsZip');
  protected readonly mayImport = computed(() => this.access.may('importProducts'));
}
