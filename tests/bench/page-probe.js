// Runs in the page before any of its own scripts; the benchmark reads `window.probe` (see page-probe.ts for its shape).
// It changes nothing that the page does: it notes when a text is drawn, when Enter is pressed, when a worker is made.
;(() => {
  /** @type {{ test: (text: string) => boolean, done: (at: number) => void } | undefined} */
  let wanted
  let enterAt = 0
  let workerAt = 0
  /** When each text was first painted, of the first few thousand that are drawn. @type {Map<string, number>} */
  const firstPainted = new Map()
  /** @type {string[]} */
  let drawnNow = []

  const isNumber = (
    /** @type {string} */ text,
    /** @type {number} */ number,
    /** @type {number} */ within,
  ) => {
    const bare = text.replace(/[^\d.-]/g, '')
    return bare !== '' && Math.abs(Number(bare) - number) <= within
  }

  const drawn = new MessageChannel()
  drawn.port1.onmessage = () => {
    const now = performance.now()
    for (const text of drawnNow) firstPainted.set(text, now)
    drawnNow = []
  }

  const fillText = CanvasRenderingContext2D.prototype.fillText
  CanvasRenderingContext2D.prototype.fillText = function (text, ...rest) {
    if (wanted?.test(String(text))) {
      const { done } = wanted
      wanted = undefined
      // Drawn in an animation frame: the next message comes after that frame is done.
      const one = new MessageChannel()
      one.port1.onmessage = () => done(performance.now())
      one.port2.postMessage(0)
    }
    if (firstPainted.size < 5_000 && !firstPainted.has(String(text))) {
      firstPainted.set(String(text), Number.NaN)
      if (drawnNow.push(String(text)) === 1) drawn.port2.postMessage(0)
    }
    return fillText.call(this, text, ...rest)
  }

  addEventListener(
    'keydown',
    (event) => {
      if (event.key === 'Enter') enterAt = event.timeStamp
    },
    { capture: true },
  )

  const PlainWorker = globalThis.Worker
  globalThis.Worker = class extends PlainWorker {
    /** @param {ConstructorParameters<typeof Worker>} given */
    constructor(...given) {
      super(...given)
      workerAt = performance.now()
    }
  }

  globalThis.probe = {
    /** Resolves when a text that reads as this number has been painted. */
    painted: (/** @type {number} */ number, /** @type {number} */ within) =>
      new Promise((resolve) => {
        wanted = {
          test: (text) => isNumber(text, number, within),
          done: (at) => resolve({ at, sinceEnter: at - enterAt }),
        }
      }),
    /** When a text that reads as this number was first painted since the page began; undefined if not yet. */
    firstPainted: (/** @type {number} */ number, /** @type {number} */ within) => {
      for (const [text, at] of firstPainted) if (isNumber(text, number, within) && at > 0) return at
      return undefined
    },
    workerAt: () => workerAt,
    /** Milliseconds between animation frames, for so long. */
    frames: (/** @type {number} */ milliseconds) =>
      new Promise((resolve) => {
        const times = []
        const started = performance.now()
        let last
        const frame = (now) => {
          if (last !== undefined) times.push(now - last)
          last = now
          if (now - started < milliseconds) requestAnimationFrame(frame)
          else resolve(times)
        }
        requestAnimationFrame(frame)
      }),
  }
})()
