/**
 * The script of reading pages: a few KB that improve what works without it. It shows who is signed in, keeps the language chosen, asks
 * the library as one types on, and brings the 3D view when somebody wants to turn a model.
 */
import type { ViewerStrings } from '../viewer3d/strings'

document.documentElement.dataset.script = 'on'

/** The typefaces come after everything else, and not at all to a reader who saves data or has a slow line: the text stands without them. */
const line = (navigator as { connection?: { saveData?: boolean; effectiveType?: string } }).connection
const fonts = document.getElementById('reader')?.dataset.fonts
if (fonts !== undefined && line?.saveData !== true && !/2g|3g/.test(line?.effectiveType ?? '')) {
  addEventListener('load', () => {
    const sheet = document.createElement('link')
    sheet.rel = 'stylesheet'
    sheet.href = fonts
    document.head.append(sheet)
  })
}

const cookie = (name: string): string | undefined => {
  const found = document.cookie.split('; ').find((pair) => pair.startsWith(`${name}=`))
  return found === undefined ? undefined : decodeURIComponent(found.slice(name.length + 1))
}

const name = cookie('quern_name')
if (name !== undefined) {
  for (const link of document.querySelectorAll<HTMLAnchorElement>('[data-account]')) {
    link.textContent = name
    link.href = '/account'
  }
}

for (const link of document.querySelectorAll<HTMLAnchorElement>('[data-language]')) {
  link.addEventListener('click', () => {
    document.cookie = `quern_language=${link.dataset.language};path=/;max-age=31536000;samesite=lax`
  })
}

for (const button of document.querySelectorAll<HTMLButtonElement>('[data-turn]')) {
  button.addEventListener('click', () => void turn(button))
}

/** The drawing gives way to the 3D view in its place, and comes back when that is closed; a failure leaves the drawing and says so. */
async function turn(button: HTMLButtonElement): Promise<void> {
  const plate = button.closest('.model')?.querySelector<HTMLElement>('.solid')
  const { turn: src, name: label = '', strings = '{}' } = button.dataset
  if (plate === null || plate === undefined || src === undefined) return
  button.disabled = true
  button.setAttribute('aria-busy', 'true')
  try {
    const { mountViewer } = await import('../viewer3d/mountViewer')
    const drawing = [...plate.childNodes]
    const stage = document.createElement('div')
    plate.replaceChildren(stage)
    const leave = mountViewer(stage, {
      src,
      label,
      strings: JSON.parse(strings) as ViewerStrings,
      onClose: () => {
        leave()
        plate.replaceChildren(...drawing)
        button.disabled = false
        button.focus()
      },
    })
  } catch (error) {
    button.disabled = false
    button.insertAdjacentText('afterend', ` ${error instanceof Error ? error.message : String(error)}`)
  }
  button.removeAttribute('aria-busy')
}
