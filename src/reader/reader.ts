/** The script of reading pages: a few KB that improve what works without it. */
document.documentElement.dataset.script = 'on'
