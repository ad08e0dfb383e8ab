/** Why something cannot be computed, or what is worth knowing about it: a stable code and a plain sentence. */
export type Reason = { readonly code: string; readonly message: string }

/** A reason that belongs to one field of a form; `field` is a dotted path such as `moisture.dryAndTin`. */
export type FieldProblem = Reason & { readonly field: string }

/** A value, or the reason it cannot be computed. */
export type Result<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly reason: Reason }
