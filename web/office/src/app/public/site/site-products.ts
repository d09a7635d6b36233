import { type Language } from '#compliance/outcome';
import { type SitePage } from '#shared/library';

type Sheet = SitePage['sheets'][number];

/** One product of the job with its sheets, the reader's language first, then English, then the rest. */
export interface SiteProduct {
  readonly name: string;
  readonly supplier: string;
  readonly pictograms: readonly string[];
  readonly signalWord: string;
  readonly sheets: readonly Sheet[];
}

const weight: Readonly<Record<string, number>> = { danger: 0, warning: 1 };
const heaviness = ({ signalWord }: { readonly signalWord: string | null }): number => weight[signalWord ?? ''] ?? 2;

/** Products in the order of harm (danger, warning, none), by name within it. The heaviest signal word of a product's sheets counts. */
export function siteProducts(sheets: readonly Sheet[], language: Language): readonly SiteProduct[] {
  const order = (sheet: Sheet): number => (sheet.language === language ? 0 : sheet.language === 'en' ? 1 : 2);
  const names = [...new Set(sheets.map(({ productName }) => productName))];
  return names
    .map((name): SiteProduct => {
      const own = sheets.filter(({ productName }) => productName === name).sort((a, b) => order(a) - order(b));
      const heaviest = [...own].sort((a, b) => heaviness(a) - heaviness(b))[0];
      return { name, supplier: own[0]?.supplier ?? '', pictograms: [...new Set(own.flatMap(({ pictograms }) => pictograms))].sort(), signalWord: heaviest?.signalWord ?? 'none', sheets: own };
    })
    .sort((a, b) => heaviness(a) - heaviness(b) || a.name.localeCompare(b.name));
}
