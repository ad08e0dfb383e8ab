// What every browser has and jsdom lacks, in the plainest form that lets components mount.

class StillObserver {
  observe(): void {}
  unobserve(): void {}
  disconnect(): void {}
  takeRecords(): never[] {
    return []
  }
}

const noMatch = (query: string): MediaQueryList => Object.assign(new EventTarget(), {
  media: query,
  matches: false,
  onchange: null,
  addListener: () => undefined,
  removeListener: () => undefined,
})

window.matchMedia ??= noMatch
window.ResizeObserver ??= StillObserver
URL.createObjectURL ??= () => 'blob:a-picture'
URL.revokeObjectURL ??= () => undefined
Element.prototype.scrollIntoView ??= () => undefined
Element.prototype.hasPointerCapture ??= () => false
Element.prototype.setPointerCapture ??= () => undefined
Element.prototype.releasePointerCapture ??= () => undefined
