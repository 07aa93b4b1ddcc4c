/** The migrated database that every test file starts from a copy of. */
export const TEMPLATE = 'template_qt';
