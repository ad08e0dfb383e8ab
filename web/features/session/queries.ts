export { sessionQueries } from '#web/data/session/queries.ts'
