/** The rich text of a step. */
export function StepText({ stepId }: { stepId: string }) {
  return <p data-step={stepId} />
}
