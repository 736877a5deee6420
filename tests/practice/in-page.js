// Questions that the browser tests ask inside the page.

/** A visible element's own rectangle, or `null`. */
const visible = (node) => node.checkVisibility() && node.getBoundingClientRect();
const all = (selector) => [...document.querySelectorAll(selector)];

const channels = (colour) => (colour.match(/[\d.]+/g) ?? []).map(Number);
/** Relative luminance and contrast as in WCAG 2.2. */
const luminance = (colour) => {
  const [red, green, blue] = channels(colour)
    .slice(0, 3)
    .map((value) => value / 255)
    .map((value) => (value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4));
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
};
const contrast = (...colours) => {
  const [low, high] = colours.map(luminance).sort((a, b) => a - b);
  return (high + 0.05) / (low + 0.05);
};
/** The colour behind an element: that of the nearest one around it that is not transparent. */
const behind = (node) => {
  for (let at = node; at !== null; at = at.parentElement) {
    const { backgroundColor } = getComputedStyle(at);
    if ((channels(backgroundColor)[3] ?? 1) === 1) return backgroundColor;
  }
  return 'rgb(255, 255, 255)';
};

globalThis.inPage = {
  /** Every visible text with its contrast. */
  contrasts() {
    const found = [];
    const texts = document.createTreeWalker(document.body, NodeFilter.SHOW_TEXT);
    while (texts.nextNode() !== null) {
      const parent = texts.currentNode.parentElement;
      const words = texts.currentNode.textContent.trim();
      if (words === '' || !parent.checkVisibility()) continue;
      found.push({ words, ratio: contrast(getComputedStyle(parent).color, behind(parent)) });
    }
    return found;
  },
  /** Elements that stick out of the window sideways. */
  stickingOut: (selector) =>
    all(selector).flatMap((node) => {
      const box = visible(node);
      return box && (box.left < 0 || box.right > innerWidth) ? [node.outerHTML] : [];
    }),
  /** Elements that are less high than this. */
  lowerThan: (selector, pixels) =>
    all(selector).flatMap((node) => {
      const box = visible(node);
      return box && box.height < pixels ? [node.outerHTML] : [];
    }),
  /** Controls without a name. */
  nameless: () =>
    all('button, input, textarea, summary').flatMap((node) => {
      const labels = [...(node.labels ?? [])].map((label) => label.textContent);
      const words = [node.getAttribute('aria-label'), node.textContent, ...labels];
      return words.some((each) => each?.trim()) ? [] : [node.outerHTML];
    }),
  focus: () => {
    const node = document.activeElement;
    return { words: node.textContent, tag: node.tagName, outline: getComputedStyle(node).outlineStyle };
  },
  tagsOf: (selector) => all(selector).map(({ tagName }) => tagName),
  styleOf: (selector, property) => getComputedStyle(document.querySelector(selector))[property],
};
