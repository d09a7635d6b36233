export { buildDemoSheet, type DemoLayout, type DemoSheetSpec } from '#server/local/demo/demo-sheet';
export * from '#server/local/demo/sheets.data';
