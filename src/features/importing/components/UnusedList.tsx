import { useTranslation } from 'react-i18next'
import type { Understanding } from '../../../../shared/api/imports'

/** Everything that did not become part of the guide, with its place and the reason: nothing is dropped silently. */
export function UnusedList({ understanding }: { understanding: Understanding }) {
  const { t } = useTranslation('importing')
  const { unused, choices } = understanding
  return (
    <>
      {choices.length > 0 && (
        <section className="understood-part">
          <div className="head">
            <h2>{t('choices')}</h2>
            <p className="note">{t('choicesHint')}</p>
          </div>
          <ul className="pairs">
            {choices.map(({ what, where }, index) => (
              <li key={index}>
                <span>{what}</span> <span className="graphite">{where}</span>
              </li>
            ))}
          </ul>
        </section>
      )}
      <section className="understood-part">
        <div className="head">
          <h2>{t('unused')}</h2>
          <p className="note">{t('unusedHint', { count: unused.length })}</p>
        </div>
        {unused.length === 0 ? (
          <p className="note">{t('allUsed')}</p>
        ) : (
          <div className="scroll-x" tabIndex={0} role="region" aria-label={t('unused')}>
            <table className="ledger">
              <thead>
                <tr>
                  <th scope="col">{t('what')}</th>
                  <th scope="col">{t('where')}</th>
                  <th scope="col">{t('why')}</th>
                </tr>
              </thead>
              <tbody>
                {unused.map((piece, index) => (
                  <tr key={index}>
                    <td>{piece.what.slice(0, 200)}</td>
                    <td>{piece.where}</td>
                    <td>{piece.why}</td>
                  </tr>
                ))}
              </tbody>
            </table>
          </div>
        )}
      </section>
    </>
  )
}
