import { sql } from 'drizzle-orm'
import { check, index, integer, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core'
import { users } from './accounts'

/** A guide: an address and its people; its content is in documents. Never deleted while a revision of it is published. */
export const guides = sqliteTable('guide', {
  id: text('id').primaryKey(),
  slug: text('slug').notNull().unique(),
  /** Who the guide is shown to be from: a workshop's or a person's name. */
  byline: text('byline').notNull(),
  createdAt: integer('created_at', { mode: 'timestamp_ms' }).notNull(),
})

/** Who works on a guide. A translator's row names the language. A guide without rows belongs to a former member. */
export const guideMembers = sqliteTable(
  'guide_member',
  {
    guideId: text('guide_id')
      .notNull()
      .references(() => guides.id, { onDelete: 'cascade' }),
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    role: text('role', { enum: ['owner', 'author', 'translator', 'reviewer'] }).notNull(),
    language: text('language').notNull().default(''),
    createdAt: integer('created_at', { mode: 'timestamp_ms' }).notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.guideId, table.userId, table.role, table.language] }),
    index('guide_member_user').on(table.userId),
  ],
)

/** An invitation by mail to a role on a guide. The token is kept only as its hash; accepting makes a guide_member. */
export const invitations = sqliteTable(
  'invitation',
  {
    id: text('id').primaryKey(),
    guideId: text('guide_id')
      .notNull()
      .references(() => guides.id, { onDelete: 'cascade' }),
    email: text('email').notNull(),
    role: text('role', { enum: ['owner', 'author', 'translator', 'reviewer'] }).notNull(),
    language: text('language').notNull().default(''),
    tokenHash: text('token_hash').notNull().unique(),
    invitedBy: text('invited_by').references(() => users.id, { onDelete: 'set null' }),
    createdAt: integer('created_at', { mode: 'timestamp_ms' }).notNull(),
    expiresAt: integer('expires_at', { mode: 'timestamp_ms' }).notNull(),
    acceptedAt: integer('accepted_at', { mode: 'timestamp_ms' }),
    withdrawnAt: integer('withdrawn_at', { mode: 'timestamp_ms' }),
  },
  (table) => [index('invitation_guide').on(table.guideId)],
)

/** Documents by the hash of their canonical JSON. Inserted once, never updated; the same content is stored once. */
export const documents = sqliteTable('document', {
  hash: text('hash').primaryKey(),
  json: text('json').notNull(),
  createdAt: integer('created_at', { mode: 'timestamp_ms' }).notNull(),
})

/** The working copy of a guide. `version` is the etag: it rises by one with every save. */
export const drafts = sqliteTable('draft', {
  guideId: text('guide_id')
    .primaryKey()
    .references(() => guides.id, { onDelete: 'cascade' }),
  documentHash: text('document_hash')
    .notNull()
    .references(() => documents.hash),
  version: integer('version').notNull(),
  updatedBy: text('updated_by').references(() => users.id, { onDelete: 'set null' }),
  updatedAt: integer('updated_at', { mode: 'timestamp_ms' }).notNull(),
})

/** Every saved state of a draft: the base of a merge, and its history. Appended, never updated. */
export const draftStates = sqliteTable(
  'draft_state',
  {
    guideId: text('guide_id')
      .notNull()
      .references(() => guides.id, { onDelete: 'cascade' }),
    version: integer('version').notNull(),
    documentHash: text('document_hash')
      .notNull()
      .references(() => documents.hash),
    savedBy: text('saved_by').references(() => users.id, { onDelete: 'set null' }),
    savedAt: integer('saved_at', { mode: 'timestamp_ms' }).notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.guideId, table.version] }),
    index('draft_state_document').on(table.documentHash),
  ],
)

/** Two authors changed one field: both versions, until a person has settled it. */
export const draftConflicts = sqliteTable(
  'draft_conflict',
  {
    id: text('id').primaryKey(),
    guideId: text('guide_id')
      .notNull()
      .references(() => guides.id, { onDelete: 'cascade' }),
    /** JSON of shared/guide/merge Conflict. */
    conflict: text('conflict').notNull(),
    mineBy: text('mine_by').references(() => users.id, { onDelete: 'set null' }),
    theirsBy: text('theirs_by').references(() => users.id, { onDelete: 'set null' }),
    createdAt: integer('created_at', { mode: 'timestamp_ms' }).notNull(),
    settledAt: integer('settled_at', { mode: 'timestamp_ms' }),
  },
  (table) => [index('draft_conflict_guide').on(table.guideId, table.settledAt)],
)

/** A published state. Never updated, never deleted. */
export const revisions = sqliteTable(
  'revision',
  {
    id: text('id').primaryKey(),
    guideId: text('guide_id')
      .notNull()
      .references(() => guides.id),
    number: integer('number').notNull(),
    label: text('label').notNull(),
    documentHash: text('document_hash')
      .notNull()
      .references(() => documents.hash),
    changeClass: text('change_class', { enum: ['wording', 'interchangeable', 'not interchangeable'] }),
    note: text('note').notNull(),
    /** The name as it was, so that a revision keeps its author when the person has left. */
    publishedByName: text('published_by_name').notNull(),
    publishedBy: text('published_by').references(() => users.id, { onDelete: 'set null' }),
    publishedAt: integer('published_at', { mode: 'timestamp_ms' }).notNull(),
  },
  (table) => [
    uniqueIndex('revision_guide_number').on(table.guideId, table.number),
    uniqueIndex('revision_guide_label').on(table.guideId, table.label),
    index('revision_published').on(table.publishedAt),
    index('revision_document').on(table.documentHash),
    check('revision_label_not_empty', sql`length(${table.label}) > 0`),
  ],
)
