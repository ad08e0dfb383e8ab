/** What the panel is doing with chosen cells; the map then picks areas. */
export type GroundTask =
  | { readonly kind: 'place'; readonly lift: number | null }
  | { readonly kind: 'inspect' }
  | { readonly kind: 'release'; readonly lift: number }
  | { readonly kind: 'review'; readonly releaseId: string }
  | { readonly kind: 'accept-as-is'; readonly lift: number }
  | { readonly kind: 'rework'; readonly lift: number }

/** What a task is called: on its button, over its form, on the drawn-down panel. */
export const TASK_TITLES: Readonly<Record<GroundTask['kind'], string>> = {
  place: 'Place fill',
  inspect: 'Record inspection',
  release: 'Release',
  review: 'Review release',
  'accept-as-is': 'Accept as is',
  rework: 'Issue rework order',
}

/** True when the task's cells are chosen on the map; a review's are the release's own. */
export function choosesCells(task: GroundTask | null): boolean {
  return task !== null && task.kind !== 'review'
}
