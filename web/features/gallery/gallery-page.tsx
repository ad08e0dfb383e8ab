import { GalleryControls } from './gallery-controls.tsx'
import { GalleryDrawings } from './gallery-drawings.tsx'
import { GalleryGround } from './gallery-ground.tsx'
import { GalleryWords } from './gallery-words.tsx'

/** Every part of the look on one sheet, to build from and to compare against. */
export function GalleryPage() {
  return (
    <main id="main" className="bg-raised">
      <h1 className="sr-only">Parts</h1>
      <div className="grid divide-y divide-rule-2 md:grid-cols-2 xl:grid-cols-3 xl:divide-x xl:divide-y-0">
        <GalleryControls />
        <GalleryGround />
        <GalleryWords />
      </div>
      <GalleryDrawings />
    </main>
  )
}
