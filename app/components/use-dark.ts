import { useSyncExternalStore } from 'react'

function subscribe(changed: () => void): () => void {
  const system = matchMedia('(prefers-color-scheme: dark)')
  const observer = new MutationObserver(changed)
  observer.observe(document.documentElement, { attributes: true, attributeFilter: ['data-chrome'] })
  system.addEventListener('change', changed)
  return () => {
    observer.disconnect()
    system.removeEventListener('change', changed)
  }
}

function isDark(): boolean {
  const { chrome } = document.documentElement.dataset
  return chrome === 'dark' || (chrome === 'system' && matchMedia('(prefers-color-scheme: dark)').matches)
}

/** Whether the paper around the page is dark; light until the page is alive. */
export const useDark = (): boolean => useSyncExternalStore(subscribe, isDark, () => false)
