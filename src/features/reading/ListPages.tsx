import type { GuideData } from '../../../shared/api/pages'
import { useGuide } from '../../components/reading/guideView'
import { ModelPlate } from '../../components/reading/ModelPlate'
import { PartsTable } from '../../components/reading/PartsTable'
import { useWords } from '../../components/reading/useWords'
import { GuideFrame } from './GuideFrame'

export function PartsPage({ guide }: { guide: GuideData }) {
  const { t } = useWords()
  return (
    <GuideFrame guide={guide} place="parts">
      <h1 className="t4 page-title">{t('place.parts')}</h1>
      <Parts />
    </GuideFrame>
  )
}

function Parts() {
  const { t } = useWords()
  const { doc } = useGuide()
  if (doc.lines.length === 0) return <p>{t('noLines')}</p>
  return <PartsTable caption={t('whatOneBuildNeeds')} />
}

export function ModelsPage({ guide }: { guide: GuideData }) {
  const { t } = useWords()
  return (
    <GuideFrame guide={guide} place="models">
      <h1 className="t4 page-title">{t('place.models')}</h1>
      <Models />
    </GuideFrame>
  )
}

function Models() {
  const { t } = useWords()
  const { doc } = useGuide()
  if (doc.models.length === 0) return <p>{t('noModels')}</p>
  return doc.models.map((model) => <ModelPlate key={model.id} model={model} />)
}
