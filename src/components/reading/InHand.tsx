import type { Step } from '../../../shared/guide/schema'
import { fileAddress } from '../../../shared/api/files'
import { Balloon } from './Balloon'
import { useGuide } from './guideView'
import { QuantityView } from './QuantityView'
import { useOwnLanguage, useWords } from './useWords'

/** What a step needs at hand: parts with quantities, tools, models. Stands before the instruction on a phone. */
export function InHand({ step }: { step: Step }) {
  const { t } = useWords()
  const own = useOwnLanguage()
  const { doc } = useGuide()
  const tools = step.tools.flatMap((id) => doc.tools.filter((tool) => tool.id === id))
  const models = step.models.flatMap((id) => doc.models.filter((model) => model.id === id))
  return (
    <>
      {step.uses.length > 0 && (
        <>
          <h3 className="label">{t('partsInHand')}</h3>
          <ul className="in-hand">
            {step.uses.map((use) => {
              const line = doc.lines.find(({ id }) => id === use.line)
              if (line === undefined) return null
              return (
                <li key={use.id}>
                  <Balloon line={use.line} named={false} />
                  <span>
                    <span {...own}>{line.options[0]!.part.name}</span>
                    <small>{t(`guide:lineKind.${line.kind}`)}</small>
                  </span>
                  {use.quantity === null ? (
                    <span>{t('guide:asNeeded')}</span>
                  ) : (
                    <QuantityView {...use.quantity} />
                  )}
                </li>
              )
            })}
          </ul>
        </>
      )}
      {tools.length > 0 && (
        <>
          <h3 className="label">{t('tools')}</h3>
          <ul className="ticks">
            {tools.map((tool) => (
              <li key={tool.id}>
                <span {...own}>{tool.name}</span>
              </li>
            ))}
          </ul>
        </>
      )}
      {models.length > 0 && (
        <>
          <h3 className="label">{t('models')}</h3>
          <ul className="ticks">
            {models.map((model) => (
              <li key={model.id}>
                <a href={fileAddress(model.asset)} {...own}>
                  {model.name}
                </a>{' '}
                STL
              </li>
            ))}
          </ul>
        </>
      )}
    </>
  )
}
