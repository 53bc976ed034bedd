import { PROBLEMS, type FieldError, type ProblemDetails, type ProblemType } from '../../shared/api/problems'

type Values = Record<string, string | number>

/** A refusal on its way to the person. Thrown by routes, turned into problem details by the app's error handler. */
export class Problem extends Error {
  constructor(
    readonly type: ProblemType,
    readonly values: Values = {},
    readonly errors: FieldError[] = [],
    options: ErrorOptions = {},
  ) {
    super(fill(PROBLEMS[type].title, values), options)
  }

  get status(): number {
    return PROBLEMS[this.type].status
  }

  details(): ProblemDetails {
    return {
      type: `/problems/${this.type}`,
      status: this.status,
      title: this.message,
      ...(Object.keys(this.values).length > 0 && { values: this.values }),
      ...(this.errors.length > 0 && { errors: this.errors }),
    }
  }
}

const fill = (sentence: string, values: Values): string =>
  sentence.replace(/\{(\w+)\}/g, (whole, name: string) => (name in values ? String(values[name]) : whole))
