import { useTranslation } from 'react-i18next'
import { Plus, X } from 'lucide-react'
import { insertNode, removeNode, setNode } from '../../../../shared/guide/edit'
import { SignalWord, type Caution } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'
import { Button } from '../../../components/controls/Button'
import { Menu } from '../../../components/controls/Menu'
import { WearMark } from '../../../components/reading/WearMark'
import { useDraft } from '../draftStore'
import { GuideText } from '../fields/GuideText'
import { focusPlace } from '../frame/useGoToPlace'
import { useOpenDraft } from '../frame/sessionContext'
import { WEAR_CODES } from './wearCodes'

export const emptyCaution = (id: Id): Caution => ({ id, signal: 'caution', hazard: '', avoid: '', wear: [] })

/** Cautions of a step, or of the whole guide where the owner is null. */
export function Cautions({ owner, cautions }: { owner: Id | null; cautions: readonly Caution[] }) {
  const { t } = useTranslation('editing')
  const { edit, newId, readOnly } = useDraft()
  const { sayDone } = useOpenDraft()
  const add = (): void => {
    const caution = emptyCaution(newId())
    edit((doc) => insertNode(doc, 'caution', caution, owner))
    setTimeout(() => focusPlace(caution.id, 'hazard'))
  }
  const remove = (caution: Caution): void => {
    const at = cautions.indexOf(caution)
    edit((doc) => removeNode(doc, 'caution', caution.id))
    sayDone(t('caution.removed'))
    const next = cautions[at + 1] ?? cautions[at - 1]
    setTimeout(() => (next === undefined ? focusPlace(null, 'add-caution') : focusPlace(next.id, 'hazard')))
  }
  return (
    <section className="step-cautions" aria-label={t('caution.name')} data-field="cautions">
      {cautions.map((caution) => (
        <CautionFields key={caution.id} caution={caution} onRemove={() => remove(caution)} />
      ))}
      {!readOnly && (
        <div data-field="add-caution">
          <Button kind="quiet" onClick={add}>
            <Plus size={16} aria-hidden />
            {t('caution.add')}
          </Button>
        </div>
      )}
    </section>
  )
}

const CLASS: Record<SignalWord, string> = {
  danger: 'danger',
  warning: 'warning',
  caution: 'caution-word',
  notice: 'notice',
}

function CautionFields({ caution, onRemove }: { caution: Caution; onRemove: () => void }) {
  const { t } = useTranslation('editing')
  const { edit, readOnly } = useDraft()
  const set = (patch: Partial<Caution>, field: string): void =>
    edit((doc) => setNode(doc, 'caution', caution.id, patch), `caution.${field}.${caution.id}`)
  const wearName = (code: string): string => t(`wear.${code}`, { ns: 'guide', defaultValue: code })
  const rest = WEAR_CODES.filter((code) => !caution.wear.includes(code))
  return (
    <div
      className={`caution ${CLASS[caution.signal]}`}
      data-node={caution.id}
      role="group"
      aria-label={t('caution.name')}
    >
      <div className="signal">
        <SignalMark word={caution.signal} />
        <select
          aria-label={t('caution.signal')}
          value={caution.signal}
          disabled={readOnly}
          data-field="signal"
          onChange={(event) => set({ signal: SignalWord.parse(event.target.value) }, 'signal')}
        >
          {SignalWord.options.map((word) => (
            <option key={word} value={word}>
              {t(`signal.${word}`, { ns: 'guide' })}
            </option>
          ))}
        </select>
        {!readOnly && (
          <button type="button" className="remove" onClick={onRemove} aria-label={t('caution.remove')}>
            <X size={18} aria-hidden />
          </button>
        )}
      </div>
      <div className="body">
        <GuideText
          look="plain"
          className="hazard"
          lines
          label={t('caution.hazard')}
          field="hazard"
          placeholder={t('caution.hazardHint')}
          value={caution.hazard}
          onChange={(hazard) => set({ hazard }, 'hazard')}
        />
        <GuideText
          look="plain"
          lines
          label={t('caution.avoid')}
          field="avoid"
          placeholder={t('caution.avoidHint')}
          value={caution.avoid}
          onChange={(avoid) => set({ avoid }, 'avoid')}
        />
        <div data-field="wear">
          <ul className="wear">
            {caution.wear.map((code) => (
              <li key={code}>
                <WearMark code={code} />
                <span>{wearName(code)}</span> <span className="graphite num">{code}</span>
                {!readOnly && (
                  <button
                    type="button"
                    className="remove"
                    aria-label={t('caution.removeWear', { name: wearName(code) })}
                    onClick={() =>
                      set({ wear: caution.wear.filter((each) => each !== code) }, `wear.${code}`)
                    }
                  >
                    <X size={16} aria-hidden />
                  </button>
                )}
              </li>
            ))}
          </ul>
          {!readOnly && rest.length > 0 && caution.wear.length < 12 && (
            <Menu
              kind="quiet"
              actions={rest.map((code) => ({
                id: code,
                text: wearName(code),
                label: (
                  <>
                    {wearName(code)} <span className="graphite num">{code}</span>
                  </>
                ),
                onAction: () => set({ wear: [...caution.wear, code] }, `wear.${code}`),
              }))}
            >
              <Plus size={16} aria-hidden />
              {t('caution.addWear')}
            </Menu>
          )}
        </div>
      </div>
    </div>
  )
}

/** The safety alert symbol; a notice, which is about things and not about people, has none (ANSI Z535.6). */
function SignalMark({ word }: { word: SignalWord }) {
  if (word === 'notice') return null
  return (
    <svg viewBox="0 0 30 27" aria-hidden="true">
      <path d="M15 1.5 28.6 25.2H1.4z" fill="currentColor" />
      <path d="M13.3 9h3.4l-.7 8.6h-2z" className="bang" />
      <circle cx="15" cy="21" r="1.8" className="bang" />
    </svg>
  )
}
