import type { Line } from '../../../shared/guide/schema'
import { Balloon } from './Balloon'
import { useGuide } from './guideView'
import { QuantityView } from './QuantityView'
import { useOwnLanguage, useWords } from './useWords'

/** The parts list as a ledger. On a phone a row folds; nothing is dropped. */
export function PartsTable({ caption }: { caption: string }) {
  const { t } = useWords()
  const { doc } = useGuide()
  return (
    <table className="ledger fold parts">
      <caption>{caption}</caption>
      <thead>
        <tr>
          <th scope="col">
            <span className="visually-hidden">{t('balloon')}</span>
          </th>
          <th scope="col">{t('part')}</th>
          <th scope="col" className="r">
            {t('quantity')}
          </th>
          <th scope="col">{t('usedIn')}</th>
          <th scope="col">{t('where')}</th>
        </tr>
      </thead>
      <tbody>
        {doc.lines.map((line) => (
          <LineRow key={line.id} line={line} />
        ))}
      </tbody>
    </table>
  )
}

function LineRow({ line }: { line: Line }) {
  const { t, number } = useWords()
  const own = useOwnLanguage()
  const { doc, whole, numbers, base } = useGuide()
  const { part, cut, print, sources } = line.options[0]!
  const others = whole.lines.find(({ id }) => id === line.id)?.options.slice(1) ?? []
  const steps = doc.sections
    .flatMap((section) => section.steps)
    .filter((step) => step.uses.some((use) => use.line === line.id))
  const within = line.within === undefined ? undefined : numbers.line[line.within]
  return (
    <tr id={line.id}>
      <td>
        <Balloon line={line.id} plain />
      </td>
      <td>
        <span className="name" {...own}>
          {part.name}
        </span>
        <small>
          {t(`guide:lineKind.${line.kind}`)}
          {part.specification !== '' && (
            <>
              {'; '}
              <span {...own}>{part.specification}</span>
            </>
          )}
        </small>
        {part.designation !== undefined && part.designation !== '' && (
          <small className="num">{part.designation}</small>
        )}
        {cut !== undefined && (
          <small>
            {t('cutFrom', { profile: cut.profile })} <QuantityView {...cut.length} />
          </small>
        )}
        {print !== undefined && <PrintSettings print={print} />}
        {within !== undefined && <small>{t('within', { number: within })}</small>}
        {line.note !== '' && <small {...own}>{line.note}</small>}
        {others.length > 0 && (
          <details className="substitutes">
            <summary>{t('mayAlsoBe', { count: others.length })}</summary>
            <ul>
              {others.map((option) => (
                <li key={option.id} {...own}>
                  {option.part.name}
                  {option.part.specification !== '' && <small>{option.part.specification}</small>}
                </li>
              ))}
            </ul>
          </details>
        )}
      </td>
      <td className="r">
        {line.quantity === null ? t('guide:asNeeded') : <QuantityView {...line.quantity} />}
        {line.sparePercent !== undefined && (
          <small>{t('spare', { percent: number(line.sparePercent) })}</small>
        )}
      </td>
      <td data-l={t('usedIn')}>
        {steps.map((step, index) => (
          <span key={step.id}>
            {index > 0 && ', '}
            <a href={`${base}/steps/${numbers.step[step.id]}`}>
              <span className="visually-hidden">{t('step')} </span>
              {numbers.step[step.id]}
            </a>
          </span>
        ))}
      </td>
      <td>
        {sources.length > 0 && <small className="on-phone">{t('where')}</small>}
        {sources.map((source) => (
          <small key={source.id} {...own}>
            {source.address === '' ? (
              source.supplier
            ) : (
              <a href={source.address} rel="nofollow ugc noreferrer">
                {source.supplier === '' ? new URL(source.address).hostname : source.supplier}
              </a>
            )}
            {source.price !== '' && `, ${source.price}`}
            {source.searchWords !== '' && (
              <>
                {'; '}
                {t('searchFor')} “{source.searchWords}”
              </>
            )}
          </small>
        ))}
      </td>
    </tr>
  )
}

function PrintSettings({ print }: { print: NonNullable<Line['options'][number]['print']> }) {
  const { t } = useWords()
  const { doc, base } = useGuide()
  const model = doc.models.find(({ id }) => id === print.model)
  const facts = [
    print.material,
    print.walls === null ? '' : t('walls', { count: print.walls }),
    print.infill === null ? '' : t('infill', { percent: print.infill }),
    print.supports === null ? '' : t(print.supports ? 'withSupports' : 'withoutSupports'),
  ].filter((fact) => fact !== '')
  return (
    <small>
      {facts.join(', ')}
      {print.layer !== null && (
        <>
          {', '}
          {t('layer')} <QuantityView {...print.layer} />
        </>
      )}
      {model !== undefined && (
        <>
          {'; '}
          <a href={`${base}/models#${model.id}`}>{t('model')}</a>
        </>
      )}
    </small>
  )
}
