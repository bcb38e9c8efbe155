// How well what carries meaning is seen: contrasts, least of each kind, and whether what is chosen is marked.
const canvas = document.createElement('canvas').getContext('2d', {willReadFrequently: true});
const rgb = colour => {
    canvas.clearRect(0, 0, 1, 1);
    canvas.fillStyle = colour;
    canvas.fillRect(0, 0, 1, 1);
    return [...canvas.getImageData(0, 0, 1, 1).data].slice(0, 3);
};
// Relative luminance and contrast as WCAG 2.1 defines them.
const linear = v => v / 255 <= 0.04045 ? v / 255 / 12.92 : ((v / 255 + 0.055) / 1.055) ** 2.4;
const light = colour => rgb(colour).map(linear).reduce((sum, v, i) => sum + v * [0.2126, 0.7152, 0.0722][i], 0);
const contrast = (a, b) => {
    const [more, less] = [light(a), light(b)].sort((p, q) => q - p);
    return (more + 0.05) / (less + 0.05);
};
const css = e => getComputedStyle(e);
const all = kind => [...document.querySelectorAll(kind)].filter(e => e.getClientRects().length > 0);
const ground = css(document.body).backgroundColor;
const least = (kind, of) => Math.min(...all(kind).map(e => of(css(e), e)));
const off = '[aria-checked=false], [aria-pressed=false]';
const others = e => all(off).filter(o => o.parentElement === e.parentElement);
const chosen = all('[aria-checked=true], [aria-pressed=true]').map(e => [e, others(e)]);
const mark = s => [s.backgroundColor, s.borderColor, s.boxShadow].join();
const unmarked = chosen.filter(([e, beside]) => beside.some(o => mark(css(o)) === mark(css(e))));
const bands = all('.band'), behind = e => css(e.parentElement.querySelector('rect')).fill;
return {
    outline: least('.outline', s => contrast(s.stroke, ground)),
    frames: least('button.act, .entry, select', s => contrast(s.borderTopColor, ground)),
    tags: least('span.tag, td.tag', s => contrast(s.color, s.backgroundColor)),
    written: least('.tag text', (s, e) => contrast(s.fill, behind(e))),
    unmarked: unmarked.map(([e]) => e.outerHTML.slice(0, 80)),
    pairs: chosen.filter(([, beside]) => beside.length > 0).length,
    fills: new Set(bands.map(e => css(e).fill)).size,
    steps: new Set(bands.map(e => e.getAttribute('class').match(/departure-\w+/)[0])).size,
};
