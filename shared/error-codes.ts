/** Every code an answer of the API can carry: closed, so that a client can tell them all apart. */
export const ERROR_CODES = [
  'invalid',
  'not_signed_in',
  'csrf',
  'forbidden',
  'not_found',
  'conflict',
  'too_many_requests',
  'id_reused',
  'covered_too_early',
  'lift_differs',
  'release_blocked',
  'too_large',
  'unavailable',
  'internal',
] as const

export type ErrorCode = (typeof ERROR_CODES)[number]
