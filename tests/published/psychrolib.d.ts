/** The part of psychrolib that the tests call. */
declare module 'psychrolib' {
  const psychrolib: {
    readonly SI: number
    SetUnitSystem(system: number): void
    GetTDewPointFromRelHum(dryBulb: number, relativeHumidity: number): number
  }
  export default psychrolib
}
