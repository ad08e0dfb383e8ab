import { AlertDialog, Dialog as RadixDialog } from 'radix-ui'
import type { ReactNode } from 'react'
import { classNames } from '#web/lib/class-names.ts'
import { useFocusReturn } from './use-focus-return.ts'

const VEIL = 'fixed inset-0 z-40 bg-[#14212a]/40'
const FRAME =
  'fixed z-50 left-1/2 top-1/2 -translate-x-1/2 -translate-y-1/2 w-[calc(100vw-24px)] max-h-[calc(100dvh-24px)] overflow-y-auto border-2 border-ink bg-raised text-ink px-[22px] pt-5 pb-[14px]'
const TITLE = 'm-0 mb-2 text-question font-extrabold text-balance'
const ACTIONS = 'mt-4 flex flex-wrap gap-2 pb-2'

type QuestionProps = {
  open: boolean
  onOpenChange: (open: boolean) => void
  /** The question, with its figure: "12 of these cells sit on ground that is not released". */
  title: string
  /** What follows from it. */
  consequence: ReactNode
  /** A reason to give, a choice to make. */
  children?: ReactNode
  /** The safe answer first. */
  actions: ReactNode
}

/**
 * A question before something that can't be taken back. It is not dismissed by a stray tap beside it; Escape leaves
 * everything as it was.
 */
export function Question({ open, onOpenChange, title, consequence, children, actions }: QuestionProps) {
  const focusReturn = useFocusReturn()
  return (
    <AlertDialog.Root open={open} onOpenChange={onOpenChange}>
      <AlertDialog.Portal>
        <AlertDialog.Overlay className={VEIL} />
        <AlertDialog.Content {...focusReturn} className={classNames(FRAME, 'max-w-[430px]')}>
          <AlertDialog.Title className={TITLE}>{title}</AlertDialog.Title>
          <AlertDialog.Description asChild>
            <div className="text-ink-2">{consequence}</div>
          </AlertDialog.Description>
          {children !== undefined && <div className="mt-[14px]">{children}</div>}
          <div className={ACTIONS}>{actions}</div>
        </AlertDialog.Content>
      </AlertDialog.Portal>
    </AlertDialog.Root>
  )
}

type DialogProps = {
  open: boolean
  onOpenChange: (open: boolean) => void
  title: string
  description?: ReactNode
  children: ReactNode
  actions?: ReactNode
  /** Room for a form of two columns. */
  wide?: boolean
}

/** A short task over the page: place fill, write a reason. */
export function Dialog({ open, onOpenChange, title, description, children, actions, wide = false }: DialogProps) {
  const focusReturn = useFocusReturn()
  return (
    <RadixDialog.Root open={open} onOpenChange={onOpenChange}>
      <RadixDialog.Portal>
        <RadixDialog.Overlay className={VEIL} />
        <RadixDialog.Content
          {...focusReturn}
          className={classNames(FRAME, wide ? 'max-w-[680px]' : 'max-w-[460px]')}
          {...(description === undefined ? { 'aria-describedby': undefined } : {})}
        >
          <RadixDialog.Title className={TITLE}>{title}</RadixDialog.Title>
          {description !== undefined && (
            <RadixDialog.Description asChild>
              <div className="mb-[14px] text-ink-2">{description}</div>
            </RadixDialog.Description>
          )}
          {children}
          {actions !== undefined && <div className={ACTIONS}>{actions}</div>}
        </RadixDialog.Content>
      </RadixDialog.Portal>
    </RadixDialog.Root>
  )
}

/** Closes the question or dialog it stands in: wrap a Button in it. */
export const QuestionCancel = ({ children }: { children: ReactNode }) => <AlertDialog.Cancel asChild>{children}</AlertDialog.Cancel>
export const DialogClose = ({ children }: { children: ReactNode }) => <RadixDialog.Close asChild>{children}</RadixDialog.Close>
