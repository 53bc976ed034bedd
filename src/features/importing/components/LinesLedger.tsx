import { useTranslation } from 'react-i18next'
import type { Understanding, UnderstoodLine } from '../../../../shared/api/imports'
import { LineKind } from '../../../../shared/guide/schema'
import { quantityText } from '../../../../shared/guide/quantityText'
import { setPiece, type Change } from '../changeUnderstanding'

/** The parts list to be: on or off, named, its kind; what could not be read as a quantity is said in its row. */
export function LinesLedger({
  understanding,
  edit,
}: {
  understanding: Understanding
  edit: (change: Change) => void
}) {
  const { t } = useTranslation('importing')
  return (
    <section className="understood-part">
      <div className="head">
        <h2>{t('partsList')}</h2>
        <p className="note">{t('partsHint')}</p>
      </div>
      {understanding.lines.length === 0 ? (
        <p className="note">{t('noLines')}</p>
      ) : (
        <div className="scroll-x" tabIndex={0} role="region" aria-label={t('partsList')}>
          <table className="ledger">
            <thead>
              <tr>
                <th scope="col">{t('take')}</th>
                <th scope="col">{t('part')}</th>
                <th scope="col">{t('kind')}</th>
                <th scope="col" className="r">
                  {t('quantity')}
                </th>
                <th scope="col">{t('from')}</th>
              </tr>
            </thead>
            <tbody>
              {understanding.lines.map((line) => (
                <LineRow key={line.key} line={line} understanding={understanding} edit={edit} />
              ))}
            </tbody>
          </table>
        </div>
      )}
    </section>
  )
}

function LineRow({
  line,
  understanding,
  edit,
}: {
  line: UnderstoodLine
  understanding: Understanding
  edit: (change: Change) => void
}) {
  const { t } = useTranslation('importing')
  const table = understanding.tables.find(({ key }) => key === line.tableKey)
  const set = (patch: Partial<UnderstoodLine>): void => edit(setPiece(line.key, patch))
  return (
    <tr>
      <td>
        <input
          type="checkbox"
          aria-label={t('takeLine', { name: line.name })}
          checked={line.include}
          onChange={(event) => set({ include: event.target.checked })}
        />
      </td>
      <td>
        <input
          className="cell-input"
          aria-label={t('partName')}
          value={line.name}
          maxLength={300}
          onChange={(event) => set({ name: event.target.value })}
        />
        {line.specification !== '' && <small>{line.specification}</small>}
        {line.substitutes.length > 0 && <small>{t('or', { names: line.substitutes.join(', ') })}</small>}
        {line.sources.length > 0 && (
          <small>
            {line.sources
              .map(({ supplier, price }) => [supplier, price].filter(Boolean).join(' '))
              .filter(Boolean)
              .join('; ')}
          </small>
        )}
        {line.note !== '' && <small>{line.note}</small>}
      </td>
      <td>
        <select
          className="cell-input"
          aria-label={t('kind')}
          value={line.kind}
          onChange={(event) => set({ kind: LineKind.parse(event.target.value) })}
        >
          {LineKind.options.map((kind) => (
            <option key={kind} value={kind}>
              {t(`guide:lineKind.${kind}`)}
            </option>
          ))}
        </select>
      </td>
      <td className="r nowrap">
        {line.quantity !== null ? (
          quantityText(line.quantity)
        ) : line.asNeeded ? (
          t('guide:asNeeded')
        ) : (
          <small className="ochre">{t('quantityMissing')}</small>
        )}
        {line.typed !== '' && line.typed !== line.quantity?.value && <small>“{line.typed}”</small>}
      </td>
      <td>
        <small>
          {table === undefined ? t('fromText') : [table.from, table.sheet].filter(Boolean).join(', ')}
        </small>
      </td>
    </tr>
  )
}
