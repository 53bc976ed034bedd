import { useId } from 'react'
import { useTranslation } from 'react-i18next'
import { useQuery } from '@tanstack/react-query'
import { MachineKind, type GuideDocument } from '../../../../shared/guide/schema'
import { LanguageTag } from '../../../../shared/lib/language/direction'
import { Select } from '../../../components/controls/Select'
import { useDraft } from '../draftStore'
import { ChooseByName } from '../fields/ChooseByName'
import { GuideText } from '../fields/GuideText'
import { StepFigures } from '../figures/StepFigures'
import { usePageTitle } from '../frame/usePageTitle'
import { Cautions } from '../step/Cautions'
import { Claims } from './Claims'
import { Credits } from './Credits'
import { languageItems } from './languages'
import { loadLicences } from './licences'
import { Skills } from './Skills'

/** What the guide says of itself on its front page. */
export function GuidePage() {
  const { t, i18n } = useTranslation('editing')
  const { document, edit, readOnly } = useDraft()
  const cautionsId = useId()
  const licences = useQuery({ queryKey: ['licences'], queryFn: loadLicences, staleTime: Infinity })
  usePageTitle(`${t('place.guide')} · ${document.title}`)
  const set = (patch: Partial<GuideDocument>, field: string): void =>
    edit((doc) => ({ ...doc, ...patch }), `guide.${field}`)
  const licenceItems = (licences.data ?? []).map(({ id, name }) => ({
    id,
    text: `${id}: ${name}`,
    content: (
      <span className="choice-of-licence">
        <span>{name}</span>
        <small className="mono">{id}</small>
      </span>
    ),
  }))
  return (
    <article className="front-fields">
      <h1 className="visually-hidden">{t('place.guide')}</h1>
      <GuideText
        look="plain"
        className="t4 title-field"
        label={t('front.title')}
        field="title"
        placeholder={t('front.titleHint')}
        value={document.title}
        onChange={(title) => set({ title }, 'title')}
      />
      <GuideText
        look="plain"
        className="lede"
        lines
        label={t('front.summary')}
        description={t('front.summaryHint')}
        field="summary"
        value={document.summary}
        onChange={(summary) => set({ summary }, 'summary')}
      />
      <div className="front-pair">
        <div data-field="machine">
          <Select
            label={t('front.machine')}
            value={document.machine}
            disabled={readOnly}
            options={MachineKind.options.map((kind) => ({
              value: kind,
              label: t(`machine.${kind}`, { ns: 'guide' }),
            }))}
            onChange={(event) => set({ machine: MachineKind.parse(event.target.value) }, 'machine')}
          />
        </div>
        <div data-field="lang">
          <ChooseByName
            label={t('front.language')}
            disabled={readOnly}
            items={languageItems(i18n.language)}
            value={document.lang}
            ownFor={(text) =>
              LanguageTag.safeParse(text).success && text !== ''
                ? { id: Intl.getCanonicalLocales(text)[0]!, text }
                : null
            }
            onChange={(lang) => set({ lang }, 'lang')}
          />
        </div>
      </div>
      <div data-field="licence">
        <ChooseByName
          label={t('front.licence')}
          description={t('front.licenceHint')}
          placeholder={t('front.licenceChoose')}
          disabled={readOnly}
          items={licenceItems}
          value={document.licence}
          ownFor={(text) => (/^LicenseRef-[A-Za-z0-9.-]+$/.test(text) ? { id: text, text } : null)}
          onChange={(licence) => set({ licence }, 'licence')}
        />
      </div>
      <section className="step-part" data-field="front">
        <h2 className="t2">{t('front.figure')}</h2>
        <StepFigures stepId={null} />
      </section>
      <section className="step-part" aria-labelledby={cautionsId}>
        <h2 className="t2" id={cautionsId}>
          {t('front.cautions')}
        </h2>
        <p className="note">{t('front.cautionsHint')}</p>
        <Cautions owner={null} cautions={document.cautions} />
      </section>
      <Claims />
      <Skills />
      <Credits />
    </article>
  )
}
