import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { describe, expect, it } from '@jest/globals';
import { FileDrop } from './file-drop';

@Component({
  selector: 'kb-drop-page',
  imports: [FileDrop],
  template: '<kb-file-drop accept=".pdf,application/pdf" (files)="taken.push($event)" />',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class DropPage {
  readonly taken: (readonly File[])[] = [];
}

async function dropped(...files: readonly File[]) {
  const fixture = TestBed.createComponent(DropPage);
  await fixture.whenStable();
  const element = fixture.nativeElement as HTMLElement;
  const event = Object.assign(new Event('drop', { bubbles: true, cancelable: true }), { dataTransfer: { files, types: ['Files'] } });
  element.querySelector('kb-file-drop')?.dispatchEvent(event);
  await fixture.whenStable();
  return { taken: fixture.componentInstance.taken.map((group) => group.map((file) => file.name)), event, words: element.querySelector('[role="status"]')?.textContent ?? '' };
}

const pdf = (name: string) => new File(['%PDF-'], name, { type: 'application/pdf' });

describe('dropping files', () => {
  it('takes what is accepted, by ending or by type, all at once', async () => {
    const { taken, event, words } = await dropped(pdf('part-a.PDF'), pdf('part b'));
    expect(taken).toEqual([['part-a.PDF', 'part b']]);
    expect(words).toBe('');
    // Else the browser leaves the page and opens the file.
    expect(event.defaultPrevented).toBe(true);
  });

  it('names what it does not take, and emits nothing when nothing is left', async () => {
    const { taken, words } = await dropped(new File(['x'], 'photo.jpg', { type: 'image/jpeg' }));
    expect(taken).toEqual([]);
    expect(words).toBe('Not taken: photo.jpg.');
  });
});
