import { Opening } from './_editor/opening'

export default function Loading() {
  return <Opening />
}
