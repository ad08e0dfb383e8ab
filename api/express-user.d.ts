declare global {
  namespace Express {
    interface User {
      readonly id: string
      readonly email: string
      readonly name: string
    }
    interface Request {
      /** also in the answer's header and in the log, so that a report can be found again */
      requestId: string
    }
  }
}

export {}
