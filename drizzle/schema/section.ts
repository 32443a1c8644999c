import {
  bigint,
  customType,
  index,
  int,
  json,
  mediumtext,
  mysqlTable,
  primaryKey,
  varchar,
} from 'drizzle-orm/mysql-core'
import { at, id, organization, user } from './auth'
import { site } from './site'

/** Bytes of Yjs: updates and whole states. */
export const bytes = customType<{ data: Uint8Array; driverData: Buffer }>({
  dataType: () => 'longblob',
  toDriver: (value) => Buffer.from(value.buffer, value.byteOffset, value.byteLength),
  fromDriver: (value) => new Uint8Array(value.buffer, value.byteOffset, value.byteLength),
})

export const section = mysqlTable(
  'section',
  {
    id: id().primaryKey(),
    siteId: id()
      .notNull()
      .references(() => site.id, { onDelete: 'cascade' }),
    practiceId: id()
      .notNull()
      .references(() => organization.id, { onDelete: 'cascade' }),
    /** Copy of the document's title, refreshed when the log is folded; the document is the truth. */
    title: varchar({ length: 200 }).notNull(),
    /** Restoring an old version starts a new epoch: a client that was away cannot merge the old future back. */
    epoch: int().notNull().default(1),
    createdBy: id()
      .notNull()
      .references(() => user.id),
    archivedAt: at(),
    createdAt: at().notNull().defaultNow(),
    updatedAt: at().notNull().defaultNow(),
  },
  (t) => [
    index('section_site').on(t.siteId, t.archivedAt, t.title),
    index('section_practice').on(t.practiceId, t.updatedAt),
  ],
)

/** The update log: what doc.on('update') gave, in the order it was committed. The log past the snapshot is the truth. */
export const sectionUpdate = mysqlTable(
  'section_update',
  {
    seq: bigint({ mode: 'number' }).primaryKey().autoincrement(),
    sectionId: id()
      .notNull()
      .references(() => section.id, { onDelete: 'cascade' }),
    epoch: int().notNull(),
    update: bytes().notNull(),
    /** Who wrote it; null for the server's own first state. */
    userId: id(),
    at: at().notNull().defaultNow(),
  },
  (t) => [index('section_update_log').on(t.sectionId, t.epoch, t.seq)],
)

/** The folded state of one section: everything in the log up to and including `seq`. */
export const sectionSnapshot = mysqlTable(
  'section_snapshot',
  {
    sectionId: id()
      .notNull()
      .references(() => section.id, { onDelete: 'cascade' }),
    epoch: int().notNull(),
    seq: bigint({ mode: 'number' }).notNull(),
    state: bytes().notNull(),
    at: at().notNull().defaultNow(),
  },
  (t) => [primaryKey({ columns: [t.sectionId, t.epoch] })],
)

/** What lists and first views show, made when the log is folded; may be thrown away and made again. */
export const sectionView = mysqlTable('section_view', {
  sectionId: id()
    .primaryKey()
    .references(() => section.id, { onDelete: 'cascade' }),
  epoch: int().notNull(),
  seq: bigint({ mode: 'number' }).notNull(),
  /** The section document (format of METHODS §1) as last read. */
  document: json(),
  /** Small true drawing with its water table, SVG text. */
  thumbnail: mediumtext(),
  readings: json(),
  at: at().notNull().defaultNow(),
})

/** Named and automatic versions that can be looked at and restored. */
export const sectionVersion = mysqlTable(
  'section_version',
  {
    id: id().primaryKey(),
    sectionId: id()
      .notNull()
      .references(() => section.id, { onDelete: 'cascade' }),
    epoch: int().notNull(),
    seq: bigint({ mode: 'number' }).notNull(),
    kind: varchar({ length: 16 }).$type<'automatic' | 'named' | 'restored'>().notNull(),
    name: varchar({ length: 200 }).notNull().default(''),
    state: bytes().notNull(),
    createdBy: id(),
    createdAt: at().notNull().defaultNow(),
  },
  (t) => [index('section_version_section').on(t.sectionId, t.createdAt)],
)
