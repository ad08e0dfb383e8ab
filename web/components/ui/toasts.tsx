import { Toaster } from 'sonner'

/** Short notices, in the look of the banners. */
export function Toasts() {
  return (
    <Toaster
      position="bottom-right"
      expand
      visibleToasts={4}
      style={{ fontFamily: 'var(--font-sans)' }}
      duration={8_000}
      containerAriaLabel="Notices"
      toastOptions={{
        unstyled: true,
        classNames: {
          toast:
            'flex w-(--width) flex-wrap items-center gap-x-[14px] gap-y-1 border border-rule-2 border-l-[5px] border-l-ink bg-film px-4 pt-[11px] pb-[9px] text-body text-ink',
          error: 'border-l-bad!',
          warning: 'border-l-warn!',
          icon: 'hidden',
          title: 'font-semibold',
          description: 'text-small text-ink-2',
          actionButton: 'link-ink ml-auto min-h-8',
        },
      }}
    />
  )
}
