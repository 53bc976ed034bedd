import { useId, useState, type FormEvent } from 'react'
import { zodResolver } from '@hookform/resolvers/zod'
import { useForm, type DefaultValues, type FieldValues, type Path } from 'react-hook-form'
import type { z } from 'zod'
import { RequestProblem } from './request'
import { useFieldSentence, useSentence } from './useSentence'

interface Sheet<In extends FieldValues, Out> {
  /** The contract of what is sent; its sentences are shown at the fields. */
  schema: z.ZodType<Out, In>
  values: DefaultValues<In>
  /** What each field is called: on the field itself and in the summary of errors. */
  labels: Partial<Record<Path<In>, string>>
  send: (values: Out) => Promise<void>
}

/**
 * A form that is checked by its contract here and by the site once more there. Refused fields are marked, everything typed stays,
 * and the summary at the head names each. `submit` goes on the form, `field('name')` on a control, `summary` on ErrorSummary.
 */
export function useRequestForm<In extends FieldValues, Out>({
  schema,
  values,
  labels,
  send,
}: Sheet<In, Out>) {
  const id = useId()
  const sentence = useSentence()
  const fieldSentence = useFieldSentence()
  const [failure, setFailure] = useState<{ sentence: string; error: unknown } | null>(null)
  const [attempt, setAttempt] = useState(0)
  const form = useForm<In, unknown, Out>({
    resolver: zodResolver(schema),
    defaultValues: values,
    // The summary takes the focus; it leads on to every field.
    shouldFocusError: false,
  })
  const { errors, isSubmitting } = form.formState
  const names = Object.keys(labels) as Path<In>[]
  const messageOf = (name: Path<In>): string | undefined => {
    const message = form.getFieldState(name, form.formState).error?.message
    return message === undefined ? undefined : fieldSentence(message)
  }

  const refuse = (error: unknown): void => {
    const wrong = error instanceof RequestProblem ? (error.details.errors ?? []) : []
    const known = wrong.filter(({ path }) => names.includes(path.join('.') as Path<In>))
    for (const { path, message } of known) form.setError(path.join('.') as Path<In>, { message })
    if (known.length === 0) setFailure({ sentence: sentence(error), error })
  }

  const submit = async (event: FormEvent): Promise<void> => {
    setFailure(null)
    await form.handleSubmit(async (checked) => {
      try {
        await send(checked)
      } catch (error) {
        refuse(error)
      }
    })(event)
    setAttempt((before) => before + 1)
  }

  const summary = names.flatMap((name) => {
    const message = errors[name] === undefined ? undefined : messageOf(name)
    return message === undefined ? [] : [{ fieldId: `${id}-${name}`, label: labels[name], sentence: message }]
  })
  return {
    form,
    attempt,
    busy: isSubmitting,
    /** Why the site refused the whole, where that is no single field's fault. */
    failure: failure?.error ?? null,
    summary: {
      errors: failure === null ? summary : [...summary, { sentence: failure.sentence }],
      attempt,
    },
    submit: (event: FormEvent) => void submit(event),
    field: (name: Path<In>) => ({
      ...form.register(name),
      id: `${id}-${name}`,
      label: labels[name] ?? name,
      error: messageOf(name),
    }),
  }
}
