import { useTranslation } from 'react-i18next'
import type { Understanding } from '../../../../shared/api/imports'
import { setPiece, type Change } from '../changeUnderstanding'

/** The solids that were brought, and the line that each belongs to. */
export function ModelList({
  understanding,
  edit,
}: {
  understanding: Understanding
  edit: (change: Change) => void
}) {
  const { t } = useTranslation('importing')
  if (understanding.models.length === 0) return null
  return (
    <section className="understood-part">
      <div className="head">
        <h2>{t('models')}</h2>
        <p className="note">{t('modelsHint')}</p>
      </div>
      <div className="scroll-x" tabIndex={0} role="region" aria-label={t('models')}>
        <table className="ledger">
          <thead>
            <tr>
              <th scope="col">{t('take')}</th>
              <th scope="col">{t('model')}</th>
              <th scope="col">{t('itsLine')}</th>
              <th scope="col" className="r">
                {t('toPrint')}
              </th>
            </tr>
          </thead>
          <tbody>
            {understanding.models.map((model) => (
              <tr key={model.key}>
                <td>
                  <input
                    type="checkbox"
                    aria-label={t('takeLine', { name: model.name })}
                    checked={model.include}
                    onChange={(event) => edit(setPiece(model.key, { include: event.target.checked }))}
                  />
                </td>
                <td>
                  {model.name}
                  <small>{model.path}</small>
                </td>
                <td>
                  <select
                    className="cell-input"
                    aria-label={t('lineOf', { name: model.name })}
                    value={model.lineKey ?? ''}
                    onChange={(event) =>
                      edit(
                        setPiece(model.key, {
                          lineKey: event.target.value === '' ? null : event.target.value,
                        }),
                      )
                    }
                  >
                    <option value="">{t('noLine')}</option>
                    {understanding.lines.map((line) => (
                      <option key={line.key} value={line.key}>
                        {line.name}
                      </option>
                    ))}
                  </select>
                </td>
                <td className="r num">{model.number ?? ''}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </section>
  )
}
