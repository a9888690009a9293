import { customType, timestamp, uuid } from 'drizzle-orm/pg-core';

/** A key that the database makes. */
export const primaryKeyUuid = () => uuid().primaryKey().defaultRandom();

/** A moment, to the millisecond, as a Date knows it; what is read back equals what was written. */
export const moment = () => timestamp({ withTimezone: true, precision: 3 });

/** The moment at which the row was written. */
export const writtenAt = () => moment().notNull().defaultNow();

const FLOAT_BYTES = 8;

/**
 * A row of doubles as bytes, each little-endian whatever the machine: no digit is lost, and no number is
 * parsed.
 */
export const float64Array = customType<{ data: Float64Array; driverData: Buffer }>({
  dataType: () => 'bytea',
  toDriver: (values) => {
    const bytes = Buffer.alloc(values.length * FLOAT_BYTES);
    values.forEach((value, i) => bytes.writeDoubleLE(value, i * FLOAT_BYTES));
    return bytes;
  },
  fromDriver: (bytes) =>
    Float64Array.from({ length: bytes.length / FLOAT_BYTES }, (_, i) => bytes.readDoubleLE(i * FLOAT_BYTES)),
});
