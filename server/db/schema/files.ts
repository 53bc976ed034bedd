import { index, integer, primaryKey, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import { users } from './accounts'

/**
 * A file that somebody brought in, by the hash of its bytes as they are stored. `facts` is JSON: a picture's size, a model's measures.
 * A row exists only once the bytes are in place. What a document refers to is never collected.
 */
export const assets = sqliteTable('asset', {
  sha256: text('sha256').primaryKey(),
  kind: text('kind', { enum: ['picture', 'model'] }).notNull(),
  mediaType: text('media_type').notNull(),
  bytes: integer('bytes').notNull(),
  name: text('name').notNull(),
  state: text('state', { enum: ['working', 'ready', 'failed'] }).notNull(),
  facts: text('facts').notNull().default('{}'),
  /** A sentence for the person where `state` is failed. */
  trouble: text('trouble'),
  uploadedBy: text('uploaded_by').references(() => users.id, { onDelete: 'set null' }),
  createdAt: integer('created_at', { mode: 'timestamp_ms' }).notNull(),
})

/** What was made from an asset: picture sizes, a model's preview and still. Made again by the job if lost. */
export const renditions = sqliteTable(
  'rendition',
  {
    sha256: text('sha256')
      .notNull()
      .references(() => assets.sha256, { onDelete: 'cascade' }),
    /** "webp-800", "avif-800", "glb", "still". */
    name: text('name').notNull(),
    file: text('file').notNull(),
    mediaType: text('media_type').notNull(),
    bytes: integer('bytes').notNull(),
    width: integer('width'),
    height: integer('height'),
  },
  (table) => [primaryKey({ columns: [table.sha256, table.name] }), index('rendition_file').on(table.file)],
)
