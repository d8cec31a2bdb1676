/** The migrated, empty database that every test's database is copied from; made by database-setup.ts. */
export const TEMPLATE = 'spinward_template';

/** Where database-setup.ts tells the workers to find the cluster. */
export const DATA_VARIABLE = 'SPINWARD_TEST_DATA';
