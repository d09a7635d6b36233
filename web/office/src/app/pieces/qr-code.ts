import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { create } from 'qrcode';

/** Clear modules around the code, ISO/IEC 18004. */
const quietZone = 4;

/** A text as a QR code, drawn as one path: sharp at any size on paper, and no picture data passes the page's content policy. */
@Component({
  selector: 'kb-qr-code',
  template: `
    <svg [attr.viewBox]="'0 0 ' + side() + ' ' + side()" role="img" [attr.aria-label]="label()" shape-rendering="crispEdges">
      <rect [attr.width]="side()" [attr.height]="side()" fill="#fff" />
      <path [attr.d]="path()" fill="#000" />
    </svg>
  `,
  styles: `
    :host {
      display: block;
    }

    svg {
      display: block;
      width: 100%;
      forced-color-adjust: none;
      print-color-adjust: exact;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class QrCode {
  readonly text = input.required<string>();
  readonly label = input.required<string>();

  // A quarter of the code may be dirty or torn: it hangs on a site.
  private readonly modules = computed(() => create(this.text(), { errorCorrectionLevel: 'Q' }).modules);
  protected readonly side = computed(() => this.modules().size + 2 * quietZone);
  protected readonly path = computed(() => {
    const { size, data } = this.modules();
    return Array.from(data, (isDark, at) => (isDark ? `M${(at % size) + quietZone} ${Math.floor(at / size) + quietZone}h1v1h-1z` : '')).join('');
  });
}
