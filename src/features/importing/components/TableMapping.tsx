import { useTranslation } from 'react-i18next'
import { ColumnMeaning, type UnderstoodTable } from '../../../../shared/api/imports'
import { Checkbox } from '../../../components/controls/Checkbox'

/** A table as it was read, with what each column was taken for; changing it reads the lines anew. Rows with a problem say it in place. */
export function TableMapping({
  table,
  busy,
  change,
}: {
  table: UnderstoodTable
  busy: boolean
  change: (next: UnderstoodTable) => void
}) {
  const { t } = useTranslation('importing')
  const problems = table.rows.filter(({ problem }) => problem !== null).length
  return (
    <details className="understood-part" open={problems > 0}>
      <summary>
        {t('table', { name: [table.from, table.sheet].filter(Boolean).join(', ') })}{' '}
        {problems > 0 && <small className="ochre">{t('problems', { count: problems })}</small>}
      </summary>
      <fieldset disabled={busy} aria-busy={busy}>
        <legend className="visually-hidden">{t('mapping')}</legend>
        <Checkbox
          label={t('takeTable')}
          checked={table.include}
          onChange={(event) => change({ ...table, include: event.target.checked })}
        />
        <div className="scroll-x" tabIndex={0} role="region" aria-label={t('mapping')}>
          <table className="ledger mapping">
            <thead>
              <tr>
                <th scope="col">{t('rowKind')}</th>
                {table.columns.map((column) => (
                  <th key={column.index} scope="col">
                    {column.heading}
                    <select
                      className="cell-input"
                      aria-label={t('columnIs', { heading: column.heading || column.index + 1 })}
                      value={column.meaning}
                      onChange={(event) =>
                        change({
                          ...table,
                          columns: table.columns.map((other) =>
                            other.index === column.index
                              ? { ...other, meaning: ColumnMeaning.parse(event.target.value) }
                              : other,
                          ),
                        })
                      }
                    >
                      {ColumnMeaning.options.map((meaning) => (
                        <option key={meaning} value={meaning}>
                          {t(`meaning.${meaning}`)}
                        </option>
                      ))}
                    </select>
                  </th>
                ))}
              </tr>
            </thead>
            <tbody>
              {table.rows.map((row) => (
                <tr key={row.key} className={row.include ? undefined : 'graphite'}>
                  <td>
                    <small>{t(`rows.${row.kind}`)}</small>
                    {row.problem !== null && <small className="ochre">{row.problem}</small>}
                  </td>
                  {table.columns.map((column) => (
                    <td key={column.index}>{row.cells[column.index]}</td>
                  ))}
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      </fieldset>
    </details>
  )
}
