/**
 * Milliseconds of processor time that this process has used, its collector and compiler included. Unlike the wall clock
 * it does not count the turns that other programs take, so that two processes compare even on a busy machine.
 */
export function cpuClock(): number {
  const { user, system } = process.cpuUsage()
  return (user + system) / 1000
}
