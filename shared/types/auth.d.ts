declare module '#auth-utils' {
  interface SecureSessionData { session: string, person: string, epoch: number }
}
export {}
