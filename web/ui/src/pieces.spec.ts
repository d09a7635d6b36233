import { ChangeDetectionStrategy, Component, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { describe, expect, it } from '@jest/globals';
import { marks } from '#compliance/answer';
import { Empty } from './empty';
import { Mark } from './mark';
import { Note } from './note';
import { Pictogram } from './pictogram';
import { SignatureImage, type SignatureStrokes } from './signature-image';
import { State, type StateKind } from './state';

@Component({
  selector: 'kb-pieces-page',
  imports: [Empty, Mark, Note, Pictogram, SignatureImage, State],
  template: `
    <kb-state [kind]="kind()">May not start</kb-state>
    <kb-note [kind]="kind()" [announce]="announce()">Words</kb-note>
    <kb-empty state="error" heading="The list did not load." retryLabel="Try again" (retry)="retries.set(retries() + 1)"><a href="#x">Elsewhere</a></kb-empty>
    @for (mark of marks; track mark) {
      <kb-mark [mark]="mark" />
    }
    <kb-mark class="beside" mark="respirator" label="Half mask, P100" [hasWords]="true" />
    <kb-mark class="silent" mark="eyes" label="" />
    @for (code of codes; track code) {
      <kb-pictogram [code]="code" />
    }
    <kb-signature-image [strokes]="strokes()" label="Signature of Marisol Tena" />
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class PiecesPage {
  readonly kind = signal<StateKind>('stop');
  readonly announce = signal(false);
  readonly retries = signal(0);
  readonly marks = marks;
  readonly codes = ['GHS01', 'GHS02', 'GHS03', 'GHS04', 'GHS05', 'GHS06', 'GHS07', 'GHS08', 'GHS09', 'GHS10'];
  readonly strokes = signal<SignatureStrokes>([]);
}

async function show() {
  const fixture = TestBed.createComponent(PiecesPage);
  await fixture.whenStable();
  const element = fixture.nativeElement as HTMLElement;
  const find = (selector: string): Element => {
    const found = element.querySelector(selector);
    if (!found) throw new Error(`nothing matches ${selector}`);
    return found;
  };
  return { page: fixture.componentInstance, fixture, element, find };
}

describe('a state', () => {
  it('carries shape and words, and changes with its kind', async () => {
    const { page, fixture, find } = await show();
    const state = find('kb-state');
    expect([...state.classList]).toEqual(expect.arrayContaining(['kb-state', 'stop']));
    expect(state.textContent).toBe('May not start');
    page.kind.set('done');
    await fixture.whenStable();
    expect(state.classList.contains('stop')).toBe(false);
    expect(state.classList.contains('done')).toBe(true);
    expect(state.classList.contains('kb-state')).toBe(true);
  });
});

describe('a note', () => {
  it.each([
    [false, 'stop', null],
    [true, 'stop', 'alert'],
    [true, 'caution', 'status'],
  ] as const)('announced %s and %s has role %s', async (announce, kind, role) => {
    const { page, fixture, find } = await show();
    page.announce.set(announce);
    page.kind.set(kind);
    await fixture.whenStable();
    expect(find('kb-note').getAttribute('role')).toBe(role);
  });
});

describe('an empty place', () => {
  it('says what failed, offers to try again, and keeps the other way out', async () => {
    const { page, find } = await show();
    expect(find('kb-empty').getAttribute('role')).toBe('alert');
    find('kb-empty button').dispatchEvent(new MouseEvent('click'));
    expect(page.retries()).toBe(1);
    expect(find('kb-empty a').textContent).toBe('Elsewhere');
  });
});

describe('marks and pictograms', () => {
  it('always have a name: every mark of the rules is drawn and named', async () => {
    const { element } = await show();
    const drawn = [...element.querySelectorAll('kb-mark:not([class]) svg')];
    expect(drawn.map((svg) => svg.getAttribute('aria-label'))).toEqual(['Eye protection', 'Face shield', 'Hearing protection', 'Gloves', 'Protective clothing', 'Safety boots', 'Respirator']);
    // Disc and at least one figure: a mark without a drawing is a blank disc.
    for (const svg of drawn) expect(svg.children.length).toBeGreaterThan(1);
  });

  it('do not say their words twice when the words stand beside them', async () => {
    const { find } = await show();
    expect(find('.beside').textContent?.trim()).toBe('Half mask, P100');
    expect(find('.beside svg').getAttribute('aria-hidden')).toBe('true');
    expect(find('.silent svg').getAttribute('aria-hidden')).toBe('true');
  });

  it('draw the nine pictograms of the GHS and write out a code nobody knows', async () => {
    const { element } = await show();
    const all = [...element.querySelectorAll('kb-pictogram')];
    expect(all.slice(0, 9).every((one) => (one.querySelector('svg')?.children.length ?? 0) > 1)).toBe(true);
    expect(all.slice(0, 9).map((one) => one.querySelector('svg')?.getAttribute('aria-label'))).toEqual([
      'Exploding bomb',
      'Flame',
      'Flame over circle',
      'Gas cylinder',
      'Corrosion',
      'Skull and crossbones',
      'Exclamation mark',
      'Health hazard',
      'Environment',
    ]);
    expect(all[9]?.textContent?.trim()).toBe('GHS10');
  });
});

describe('a signature', () => {
  it('is redrawn from its strokes, one path each, a single point as a dot', async () => {
    const { page, fixture, find, element } = await show();
    page.strokes.set([
      { points: [{ x: 10, y: 10 }, { x: 20, y: 30 }, { x: 40, y: 10 }] },
      { points: [{ x: 60, y: 20 }] },
      { points: [] },
    ]);
    await fixture.whenStable();
    expect(find('kb-signature-image svg').getAttribute('viewBox')).toBe('4 4 62 32');
    expect([...element.querySelectorAll('kb-signature-image path')].map((path) => path.getAttribute('d'))).toEqual(['M10 10Q20 30 30 20L40 10', 'M60 20h.01']);
  });

  it('says so when there are no strokes', async () => {
    const { find } = await show();
    expect(find('kb-signature-image').textContent).toContain('No strokes were stored.');
  });
});
