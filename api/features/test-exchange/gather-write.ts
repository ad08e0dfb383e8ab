import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import type { GroundPatch, PatchEntry } from '#shared/ground-codec.ts'
import type { ChangedResource } from '#shared/realtime.ts'

/**
 * A write that several changes of the Ground are made in as if each were alone: their patches become one, in which the last
 * standing of each cell and lift counts, and open boards are told once of each kind of thing that changed.
 * @returns the write to work with, and what puts the gathered on the real one
 */
export function gatherWrite(write: SiteWrite): { readonly gathering: SiteWrite; readonly finish: () => void } {
  const patches: Omit<GroundPatch, 'revision' | 'base'>[] = []
  const changed = new Map<ChangedResource, string>()
  const gathering: SiteWrite = { ...write, patch: (patch) => void patches.push(patch), changed: (resource, id) => void changed.set(resource, id) }
  const finish = (): void => {
    const last = patches.at(-1)
    if (last) write.patch({ entries: lastStandings(patches.flatMap((patch) => patch.entries)), lots: [...new Set(patches.flatMap((patch) => patch.lots))], totals: last.totals, from: last.from })
    for (const [resource, id] of changed) write.changed(resource, id)
  }
  return { gathering, finish }
}

function lastStandings(entries: readonly PatchEntry[]): PatchEntry[] {
  const surfaces = new Map(entries.map((entry) => [entry.cell, entry.surface]))
  const standings = new Map(entries.map((entry) => [`${entry.cell} ${entry.lift}`, entry]))
  return [...standings.values()].map((entry) => ({ ...entry, surface: surfaces.get(entry.cell) ?? entry.surface }))
}
