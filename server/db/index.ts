export { recordInAudit, type AuditEntry } from './audit';
export { connectDatabase, type Database, type Db, type Executor, type Tx } from './client';
export { databaseCode, isForeignKeyViolation, isUniqueViolation } from './database-errors';
export { createEventFeed, type EventFeed } from './event-feed';
export { listen, type Listener } from './listener';
export { migrate } from './migrate';
export { findProduct, type FoundProduct, type ProductKey } from './product-of';
export { readSchemaState, requireCurrentSchema, SchemaMismatchError } from './schema-version';
export { inTransaction } from './transaction';
