/** The figures of a step, or the front figure where there is no step. */
export function StepFigures({ stepId }: { stepId: string | null }) {
  return <p data-step={stepId} />
}
