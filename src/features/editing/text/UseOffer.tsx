import { useTranslation } from 'react-i18next'
import { insertNode } from '../../../../shared/guide/edit'
import type { Step, Use } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'
import { Button } from '../../../components/controls/Button'
import { useDraft } from '../draftStore'
import { PartBalloon } from '../fields/PartBalloon'

export interface UseOfferProps {
  line: Id
  count: string
  step: Step
  onDone: () => void
}

/** A part was named that the step does not take in hand: offers to list it, so that parts list and steps add up. */
export function UseOffer({ line, count, step, onDone }: UseOfferProps) {
  const { t } = useTranslation('editingText')
  const { document, edit, newId, announce } = useDraft()
  const found = document.lines.find(({ id }) => id === line)
  if (found === undefined) return null
  const { name } = found.options[0]!.part
  const add = (): void => {
    const unit = found.quantity?.unit ?? 'each'
    const quantity: Use['quantity'] = found.quantity === null ? null : { value: count, unit }
    edit((doc) => insertNode(doc, 'use', { id: newId(), line, quantity }, step.id))
    announce(t('offer.added', { name }))
    onDone()
  }
  return (
    <div className="use-offer" role="status">
      <span>
        <PartBalloon line={line} when={step.when} /> {t('offer.question', { name })}
      </span>
      <Button onClick={add}>
        {found.quantity === null ? t('offer.add') : t('offer.addCount', { number: count })}
      </Button>
      <Button kind="quiet" onClick={onDone}>
        {t('offer.no')}
      </Button>
    </div>
  )
}
