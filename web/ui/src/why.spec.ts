import { ChangeDetectionStrategy, Component, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { describe, expect, it } from '@jest/globals';
import { type Finding, type Language } from '#compliance/outcome';
import { usFederal } from '#compliance/source';
import { Why } from './why';

const finding: Finding = {
  id: 'silica-basis/blast',
  ruleId: 'silica-basis',
  topic: 'gate',
  taskId: 'blast',
  personId: null,
  outcome: 'undecided',
  isHolding: true,
  text: { en: 'Shot blasting may not start', es: 'El granallado no puede empezar' },
  reason: { en: 'No sample covers this setting.', es: 'Ninguna muestra cubre este lugar.' },
  inputs: { 'Table 1 row': null, 'objective data': false, minutes: 1500, setting: 'enclosed' },
  whatWouldChange: { en: 'A qualified person signs a basis.', es: 'Una persona calificada firma una base.' },
  whoDecides: { en: 'a qualified person', es: 'una persona calificada' },
  source: usFederal('1926.1153', 'read', { paragraph: '(d)(2)', url: 'https://www.osha.gov/laws-regs/regulations/standardnumber/1926/1926.1153' }),
  packVersion: 'us-federal 1',
};

@Component({
  selector: 'kb-why-page',
  imports: [Why],
  template: '<kb-why [finding]="finding" about="Shot blasting" [language]="language()" />',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class WhyPage {
  readonly finding = finding;
  readonly language = signal<Language>('en');
}

async function show() {
  const fixture = TestBed.createComponent(WhyPage);
  await fixture.whenStable();
  const element = fixture.nativeElement as HTMLElement;
  const button = element.querySelector('button');
  if (!button) throw new Error('no button');
  const press = async () => {
    button.click();
    await fixture.whenStable();
  };
  return { page: fixture.componentInstance, fixture, element, button, press, words: () => (element.querySelector('kb-why-panel')?.textContent ?? '').replace(/\s+/g, ' ') };
}

describe('why', () => {
  it('is closed at first and names what it is about for those who only hear it', async () => {
    const { button, words } = await show();
    expect(button.getAttribute('aria-expanded')).toBe('false');
    expect(button.getAttribute('aria-label')).toBe('why: Shot blasting');
    expect(words()).toBe('');
  });

  it('opens outcome, reason, who decides, facts, what would change it and the source with how it was verified', async () => {
    const { button, press, words, element } = await show();
    await press();
    expect(button.getAttribute('aria-expanded')).toBe('true');
    expect(element.querySelector(`#${button.getAttribute('aria-controls')}`)).not.toBeNull();
    for (const part of [
      'Not decided',
      'No sample covers this setting.',
      'a qualified person',
      'Table 1 row: not known',
      'objective data: no',
      'minutes: 1,500',
      'setting: enclosed',
      'A qualified person signs a basis.',
      '29 CFR 1926.1153 (d)(2)',
      'text read',
      'silica-basis, us-federal 1',
    ])
      expect(words()).toContain(part);
    expect(element.querySelector('a')?.getAttribute('href')).toBe(finding.source.url);
  });

  it('closes again', async () => {
    const { press, words } = await show();
    await press();
    await press();
    expect(words()).toBe('');
  });

  it('speaks Spanish, facts included', async () => {
    const { page, press, words } = await show();
    page.language.set('es');
    await press();
    expect(words()).toContain('Sin decidir');
    expect(words()).toContain('Ninguna muestra cubre este lugar.');
    expect(words()).toContain('objective data: no');
    expect(words()).toContain('Table 1 row: no se sabe');
    expect(words()).not.toContain('No sample covers');
  });
});
