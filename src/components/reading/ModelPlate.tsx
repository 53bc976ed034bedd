import Big from 'big.js'
import { fileAddress, type ModelFacts } from '../../../shared/api/files'
import type { Model } from '../../../shared/guide/schema'
import { Balloon } from './Balloon'
import { useGuide } from './guideView'
import { QuantityView } from './QuantityView'
import { useOwnLanguage, useWords } from './useWords'

/** A solid: its drawing first, its measures, the file; the 3D view only when somebody asks for it. */
export function ModelPlate({ model }: { model: Model }) {
  const { t } = useWords()
  const own = useOwnLanguage()
  const { doc, files, label } = useGuide()
  const viewer: unknown = t('viewer:', { returnObjects: true })
  const file = files.get(model.asset)
  const still = file?.renditions.find(({ name }) => name === 'still')
  const preview = file?.renditions.find(({ name }) => name === 'glb')
  const line = doc.lines.find(({ options }) => options[0]?.print?.model === model.id)
  const download = `${shortName(model.name)}-${label}${line?.quantity?.unit === 'each' ? `-${line.quantity.value}x` : ''}.stl`
  return (
    <section className="row model" id={model.id}>
      <div className="margin">{line !== undefined && <Balloon line={line.id} />}</div>
      <div className="text">
        <h2 className="t2" {...own}>
          {model.name}
        </h2>
        <div className="plate solid" dir="ltr">
          {still !== undefined && (
            <img
              className="drawing"
              src={fileAddress(model.asset, 'still')}
              width={still.width ?? 800}
              height={still.height ?? 600}
              alt={t('drawingOf', { name: model.name })}
              loading="lazy"
            />
          )}
        </div>
      </div>
      <div className="side">
        {file?.model !== undefined && file.model !== null && <Measures model={model} facts={file.model} />}
        <p className="actions after">
          {preview !== undefined && (
            <button
              type="button"
              className="button needs-script"
              data-turn={fileAddress(model.asset, 'glb')}
              data-name={model.name}
              data-strings={JSON.stringify(viewer)}
            >
              {t('turnIn3d')}
            </button>
          )}
          <a className="button" href={fileAddress(model.asset)} download={download}>
            STL
          </a>
        </p>
      </div>
    </section>
  )
}

function Measures({ model, facts }: { model: Model; facts: ModelFacts }) {
  const { t, number } = useWords()
  const round = (value: number): string => new Big(value).round(1).toFixed()
  const troubles = [
    facts.closed ? '' : t('notClosed', { count: facts.openEdges }),
    facts.backwardsEdges > 0 ? t('backwards', { count: facts.backwardsEdges }) : '',
  ].filter((trouble) => trouble !== '')
  return (
    <dl className="facts">
      <dt>{t('size')}</dt>
      <dd>
        <span className="num nowrap" dir="ltr">
          {number(round(facts.box.x))} × {number(round(facts.box.y))} × {number(round(facts.box.z))}
          <span className="unit">{model.unit}</span>
        </span>
      </dd>
      {model.unit === 'mm' && facts.closed && (
        <>
          <dt>{t('volume')}</dt>
          <dd>
            <QuantityView value={round(facts.volume / 1000)} unit="ml" />
          </dd>
        </>
      )}
      {model.material !== '' && (
        <>
          <dt>{t('material')}</dt>
          <dd>{model.material}</dd>
        </>
      )}
      <dt>{t('mesh')}</dt>
      <dd>
        {troubles.length === 0 ? (
          <span className="lichen">{t('closed')}</span>
        ) : (
          <span className="ochre">{troubles.join('; ')}</span>
        )}
      </dd>
    </dl>
  )
}

/** Short part first, so that it is not cut off on a printer's display. */
function shortName(name: string): string {
  return (
    name
      .replace(/[^\p{L}\p{N}]+/gu, '-')
      .replace(/^-|-$/g, '')
      .slice(0, 24) || 'model'
  )
}
