import { invalid } from '#api/errors.ts'
import type { AppError } from '#api/errors.ts'
import type { InputIssue } from '#api/http/validate.ts'

/** 400 with every problem and the part of the form it belongs to; the first one is the message. */
export function refusal(issues: readonly [InputIssue, ...InputIssue[]]): AppError {
  const [first, ...others] = issues
  const more = others.length === 0 ? '' : ` ${others.length} more ${others.length === 1 ? 'thing needs' : 'things need'} a look.`
  return invalid(`${first.message}${more} Nothing was saved; what you entered was kept.`, { issues })
}

/** Throws the refusal when there are problems. */
export function refuseIf(issues: readonly InputIssue[]): void {
  const [first, ...others] = issues
  if (first) throw refusal([first, ...others])
}
