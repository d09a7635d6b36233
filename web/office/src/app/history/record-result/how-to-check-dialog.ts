import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle } from '@angular/material/dialog';
import { HistoryApi } from '../history-api';

/** How anybody proves the record with public tools, without asking whoever runs Kneeboard. */
@Component({
  selector: 'kb-how-to-check-dialog',
  imports: [MatButton, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle],
  template: `
    <h2 matDialogTitle>How to check without us</h2>
    <mat-dialog-content><div class="kb-stack">
      <p>
        Every signature, refusal and published text is an entry of one append-only list. Each entry's hash goes into a tree of hashes (RFC 9162, SHA-256). A checkpoint is a signed note that says how long the list was and what its root
        hash was at that moment. Whoever keeps an old checkpoint can prove that nothing before it was changed, removed or added later.
      </p>
      <ol>
        <li>Save the record: <a [href]="recordHref" download>record as JSON Lines</a>. One line is one entry, checkpoint or key.</li>
        <li>Check it on your own machine, where this program is not needed. The verifier is one file that uses only Node.js: <code>npm run -s verify -- FILE</code>. It names the first entry that is wrong.</li>
        <li>For one signature, save its receipt. It holds the entry, the hashes beside its path and the checkpoint; <code>sha256sum</code> and <code>openssl</code> are enough to follow them.</li>
        <li>Compare the checkpoint with the one you were sent or printed earlier. The list may only have grown.</li>
        <li>The exact text of a signature is the file behind “Save the bytes”: its <code>sha256sum</code> must be the one in the entry.</li>
      </ol>
    </div></mat-dialog-content>
    <mat-dialog-actions align="start"><button type="button" matButton="filled" matDialogClose>Close</button></mat-dialog-actions>
  `,
  styles: `
    ol {
      padding-inline-start: 1.25rem;
    }

    li + li {
      margin-top: 0.5rem;
    }

    code {
      font-family: var(--kb-mono);
      font-size: 0.9em;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class HowToCheckDialog {
  protected readonly recordHref = inject(HistoryApi).recordHref();
}
