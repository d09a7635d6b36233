import { pageOf, type Role } from './common';
import { SheetCorrection, SheetSuggestions } from './corrections';
import { type Endpoint } from './endpoints';
import { AppliedRevision, AskSupplier, ContainerLabel, ImportPreview, ImportProducts, ImportedProducts, LabelQuery, LibraryPolicy, LibraryTask, OpenRequest, ProductUse, ProductUsesQuery, Reach, RequestsQuery, ReturnSheet, SearchAnswer, SearchQuery, SheetRequest, SheetReturnDraft, SiteCode, SitePage, UseLink, ZipOutcome } from './library';
import { PageQuery } from './common';

const everyone: readonly Role[] = ['owner', 'safety-officer', 'crew-lead', 'auditor'];
const officer: readonly Role[] = ['safety-officer'];
const office: readonly Role[] = ['owner', 'safety-officer', 'crew-lead'];

/** Keeping the library: search, reach of a revision, requests to suppliers, bulk, site codes, labels. */
export const libraryKeepingEndpoints = {
  searchSheets: { method: 'GET', path: '/api/sheet-search', access: everyone, query: SearchQuery, answer: SearchAnswer },
  readReach: { method: 'GET', path: '/api/sheets/:revisionId/reach', access: everyone, answer: Reach },
  applyRevision: { method: 'POST', path: '/api/sheets/:revisionId/application', access: officer, answer: AppliedRevision },
  listProductUses: { method: 'GET', path: '/api/product-uses', access: everyone, query: ProductUsesQuery, answer: pageOf(ProductUse) },
  listLibraryTasks: { method: 'GET', path: '/api/library-tasks', access: office, query: PageQuery, answer: pageOf(LibraryTask) },
  readLibraryPolicy: { method: 'GET', path: '/api/library-policy', access: everyone, answer: LibraryPolicy },
  setLibraryPolicy: { method: 'PUT', path: '/api/library-policy', access: officer, body: LibraryPolicy, answer: LibraryPolicy },
  listRequests: { method: 'GET', path: '/api/sheet-requests', access: office, query: RequestsQuery, answer: pageOf(SheetRequest) },
  askSupplier: { method: 'POST', path: '/api/sheet-requests', access: officer, body: AskSupplier, answer: SheetRequest },
  draftReturn: { method: 'GET', path: '/api/sheets/:revisionId/return', access: officer, answer: SheetReturnDraft },
  returnSheet: { method: 'POST', path: '/api/sheets/:revisionId/return', access: officer, needsVersion: true, body: ReturnSheet, answer: SheetRequest },
  withdrawRequest: { method: 'DELETE', path: '/api/sheet-requests/:requestId', access: officer, answer: SheetRequest },
  openRequest: { method: 'POST', path: '/api/open-requests', access: 'public', body: UseLink, answer: OpenRequest },
  /** The link's token travels in the header `X-Kneeboard-Link`. */
  answerRequest: { method: 'POST', path: '/api/open-requests/sheet', access: 'public', body: 'file', answer: 'nothing' },
  listSuggestions: { method: 'GET', path: '/api/sheets/:revisionId/suggestions', access: everyone, answer: SheetSuggestions },
  listCorrections: { method: 'GET', path: '/api/sheet-corrections', access: everyone, query: PageQuery, answer: pageOf(SheetCorrection) },
  removeCorrection: { method: 'DELETE', path: '/api/sheet-corrections/:correctionId', access: officer, answer: 'nothing' },
  uploadZip: { method: 'POST', path: '/api/sheet-zips', access: office, body: 'file', answer: ZipOutcome },
  exportSheetsZip: { method: 'GET', path: '/api/sheets.zip', access: everyone, answer: 'bytes' },
  exportProductsCsv: { method: 'GET', path: '/api/products.csv', access: everyone, answer: 'bytes' },
  previewImport: { method: 'POST', path: '/api/product-imports/preview', access: officer, body: 'file', answer: ImportPreview },
  importProducts: { method: 'POST', path: '/api/product-imports', access: officer, body: ImportProducts, answer: ImportedProducts },
  readSiteCode: { method: 'GET', path: '/api/jobs/:jobId/site-code', access: office, answer: SiteCode },
  makeSiteCode: { method: 'POST', path: '/api/jobs/:jobId/site-code', access: ['safety-officer', 'crew-lead'], answer: SiteCode },
  revokeSiteCode: { method: 'DELETE', path: '/api/jobs/:jobId/site-code', access: ['safety-officer', 'crew-lead'], answer: SiteCode },
  openSite: { method: 'POST', path: '/api/site', access: 'public', body: UseLink, answer: SitePage },
  /** The code's token travels in the header `X-Kneeboard-Link`. */
  readSiteSheet: { method: 'GET', path: '/api/site/sheets/:revisionId/file', access: 'public', answer: 'bytes' },
  readKitLabel: { method: 'GET', path: '/api/kits/:kitId/label', access: everyone, query: LabelQuery, answer: ContainerLabel },
  readProductLabel: { method: 'GET', path: '/api/products/:productId/label', access: everyone, answer: ContainerLabel },
} as const satisfies Record<string, Endpoint>;
