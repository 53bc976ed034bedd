import { index, integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'
import { users } from './accounts'
import { guides } from './guides'

/**
 * Files that a person brought in and what was understood of them, before anything is created. `understanding` is JSON of
 * shared/importing. Thrown away a week after it was taken or left.
 */
export const imports = sqliteTable(
  'import',
  {
    id: text('id').primaryKey(),
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    /** The guide that it adds to; null where it makes a new one. */
    guideId: text('guide_id').references(() => guides.id, { onDelete: 'cascade' }),
    state: text('state', { enum: ['reading', 'understood', 'taken', 'failed'] }).notNull(),
    understanding: text('understanding').notNull().default('{}'),
    trouble: text('trouble'),
    createdAt: integer('created_at', { mode: 'timestamp_ms' }).notNull(),
    updatedAt: integer('updated_at', { mode: 'timestamp_ms' }).notNull(),
  },
  (table) => [index('import_user').on(table.userId)],
)
