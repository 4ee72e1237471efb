import { customType, datetime, varchar } from 'drizzle-orm/mysql-core';

/** A UUID made in code (the dialect has no `returning`), compared byte by byte. */
export const id = customType<{ data: string; driverData: string }>({
  dataType: () => 'char(36) CHARACTER SET ascii COLLATE ascii_bin',
});

/** A SHA-256 in lower-case hexadecimal: of a file, or of a secret that is itself never stored. */
export const sha256 = customType<{ data: string; driverData: string }>({
  dataType: () => 'char(64) CHARACTER SET ascii COLLATE ascii_bin',
});

/** An instant in UTC, exact to the millisecond. */
export function utcDateTime(name: string) {
  return datetime(name, { mode: 'date', fsp: 3 });
}

/**
 * A JSON value. MariaDB's JSON is checked text and comes back as text; this parses it. Objects and arrays only: a bare
 * JSON string could not be told from unparsed text.
 */
export function json<T extends object>(name: string) {
  return customType<{ data: T; driverData: string }>({
    dataType: () => 'json',
    toDriver: (value) => JSON.stringify(value),
    fromDriver: (value) => (typeof value === 'string' ? JSON.parse(value) : value) as T,
  })(name);
}

/** Text compared byte by byte. The default collation ignores case, and then the numerals `ii` and `II` are one. */
export function binaryText(name: string, length: number) {
  return customType<{ data: string; driverData: string }>({
    dataType: () => `varchar(${length}) CHARACTER SET utf8mb4 COLLATE utf8mb4_bin`,
  })(name);
}

/** A sentence or a title that a person typed. */
export function shortText(name: string) {
  return varchar(name, { length: 300 });
}


export function createdAt() {
  return utcDateTime('created_at')
    .notNull()
    .$defaultFn(() => new Date());
}

export function updatedAt() {
  return utcDateTime('updated_at')
    .notNull()
    .$defaultFn(() => new Date())
    .$onUpdateFn(() => new Date());
}
