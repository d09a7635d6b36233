import { describe, expect, it } from '@jest/globals';
import { pagesFrom } from '#test/support/sheet-text';
import { readLines } from './read-sheet';
import { companyName } from './supplier';

const rest = '\nSection 2. Hazards identification\nThis text only makes the sheet long enough to be read.\nSection 3. Composition/information on ingredients\nNone.';
const read = (section1: string, before = '', edge = '') => readLines(edge ? [1, 2].map((page) => pagesFrom(`${edge}\n${page === 1 ? before : ''}\n${page === 1 ? `Section 1. Identification\n${section1}` : rest}`)[0] ?? []) : pagesFrom(`${before}\nSection 1. Identification\n${section1}${rest}`));

describe('the product name', () => {
  it.each([
    ['beside its label', 'Product name          Quarrybond 40\nProduct code          QB40'],
    ['after a colon', 'Product Name: Quarrybond 40\nProduct Use: floors'],
    ['after a colon of its own', 'Product name          : Quarrybond 40\nProduct type          : Liquid.'],
    ['below its label', 'PRODUCT NAME\n     Quarrybond 40\nMANUFACTURER\n     Northlode Resins, Inc.'],
    ['under "1.1 Product identifier"', '1.1 Product identifier\nTrade name: Quarrybond 40\n1.2 Relevant identified uses'],
    ['as the product identifier itself', '1.1 Product identifier          Quarrybond 40\nOther means of identification   None'],
    ['before a code that is called identifier', 'Product identifier        QB40-001\nProduct Name:             Quarrybond 40'],
    ['with a star', 'Nombre del producto     : *Quarrybond 40\nCódigo del producto     : QB40'],
    ['in French', 'Nom du produit : Quarrybond 40'],
    ['in German', 'Handelsname: Quarrybond 40'],
    ['with a label that says more', 'Trade Name (as labeled): Quarrybond 40'],
    ['over a label broken in two', 'Nombre del     Quarrybond 40\nproducto'],
    ['without mark or gap', 'Product name Quarrybond 40'],
    ['before the code in the same line', 'Product name: Quarrybond 40  Product code: QB40'],
  ])('stands %s', (_, section1) => {
    expect(read(section1).productName?.value).toBe('Quarrybond 40');
  });

  it('is surer where the header repeats it', () => {
    const plain = read('Product name: Quarrybond 40').productName;
    const repeated = read('Product name: Quarrybond 40', '', 'Quarrybond 40          Revision date 1 May 2020').productName;
    expect(repeated?.value).toBe('Quarrybond 40');
    expect(repeated?.confidence).toBeGreaterThan(plain?.confidence ?? 1);
  });

  it('is taken from the title that every page repeats, with less confidence, when no label names it', () => {
    const field = read('Recommended use: floors', 'Safety Data Sheet', 'Quarrybond 40').productName;
    expect(field).toMatchObject({ value: 'Quarrybond 40', because: expect.stringMatching(/No label/) });
    expect(field?.confidence).toBeLessThanOrEqual(0.5);
  });

  it.each(['Product name: Not applicable', 'Recommended use: floors', 'Product name:\nProduct code: QB40'])('stays open rather than guessed: %s', (section1) => {
    expect(read(section1).productName).toBeNull();
  });

  it('goes on in the next line of its cell', () => {
    expect(read('Product name     Quarrybond 40 cementitious floor\n                 mortar, gray').productName?.value).toBe('Quarrybond 40 cementitious floor mortar, gray');
  });
});

describe('the supplier', () => {
  it.each([
    ['beside its label', 'Manufacturer     Northlode Resins, Inc.\n                 1180 Ore Dock Road'],
    ['before the address in the same line', 'Manufacturer     Northlode Resins, Inc. 1180 Ore Dock Road, Superior, WI 54880'],
    ['below its label', "MANUFACTURER'S NAME                EMERGENCY TELEPHONE NO.\nNorthlode Resins, Inc.             (715) 555-0100"],
    ['in a block under a subheading', '1.3 Details of the supplier of the safety data sheet\n-\nNorthlode Resins, Inc.\n1180 Ore Dock Road'],
    ['under a label under a subheading', "Manufacturer or supplier's details\nCompany name of supplier     : Northlode Resins, Inc.\nAddress                      : 1180 Ore Dock Road"],
    ['not "Same as supplier"', 'Manufacturer     Same as supplier\nSupplier         Northlode Resins, Inc.'],
    ['past an empty label', 'Supplier\nTelephone number     0800 555 0100\nCompany              Northlode Resins, Inc.'],
    ['as a company in Spanish', 'Fabricante     : Northlode Resins, Inc.\n                 1180 Ore Dock Road'],
    ['on two lines in German', 'Hersteller/Lieferant:\nNorthlode Resins, Inc.\nHafenstraße 3'],
  ])('stands %s', (_, section1) => {
    expect(read(section1).supplier?.value).toBe('Northlode Resins, Inc.');
  });

  it('may stand only in the footer', () => {
    expect(read('Product name: Quarrybond 40', '', 'Northlode Resins, Inc.          Quarrybond 40').supplier).toMatchObject({ value: 'Northlode Resins, Inc.', because: expect.stringMatching(/No label/) });
  });

  it.each([
    ['Slatefield 6 L.L.C.', 'Slatefield 6 L.L.C.'],
    ['Pier 9 Coatings LLC, 4 Pier Rd', 'Pier 9 Coatings LLC'],
    ['3Q Coatings', '3Q Coatings'],
    ['1180 Ore Dock Road', null],
    ['(715) 555-0100', null],
    ['info@northlode.example', null],
    ['Same as above', null],
  ])('%s names %s', (text, name) => {
    expect(companyName(text)).toBe(name);
  });
});
