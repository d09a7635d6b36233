import { TestBed } from '@angular/core/testing';
import { afterEach, describe, expect, it } from '@jest/globals';
import { ReaderLanguage } from './reader-language';

const opened = (): ReaderLanguage => {
  TestBed.resetTestingModule();
  return TestBed.inject(ReaderLanguage);
};

describe('the language of a page that opens from a link', () => {
  afterEach(() => localStorage.clear());

  it('is the one chosen last on this phone, also when the page opens again', () => {
    expect(opened().language()).toBe('en');
    opened().use('es');
    expect(opened().language()).toBe('es');
  });

  it('is the browser’s where something strange is kept', () => {
    localStorage.setItem('kneeboard-reader-language', '<img>');
    expect(opened().language()).toBe('en');
  });
});
