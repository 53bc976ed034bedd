import { useGuide } from './guideView'
import { StepView } from './StepView'

/** All steps one after the other. */
export function GuideReading() {
  const { doc } = useGuide()
  const first = doc.sections[0]?.steps[0]?.id
  return doc.sections.flatMap((section) =>
    section.steps.map((step) => <StepView key={step.id} id={step.id} eager={step.id === first} />),
  )
}
