import type { ReactNode } from 'react'
import { SectionHead } from '#web/components/ui/section-head.tsx'

export function GalleryColumn({ children }: { children: ReactNode }) {
  return <div className="grid content-start gap-[26px] px-5 py-[26px] sm:px-[30px]">{children}</div>
}

export function GalleryPart({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section className="min-w-0">
      <SectionHead>{title}</SectionHead>
      {children}
    </section>
  )
}
