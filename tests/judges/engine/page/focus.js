// What has the focus, and what is wrong with how it shows: a ring round it in the colour of rings, or, in a drawing,
// a line of that colour on what it has chosen.
const e = document.activeElement, place = e.getBoundingClientRect();
const probe = document.body.appendChild(document.createElement('i'));
probe.style.color = 'var(--green)';
const colour = getComputedStyle(probe).color;
probe.remove();
const outlined = s => s.outlineStyle !== 'none' && parseFloat(s.outlineWidth) >= 2 && s.outlineColor === colour;
const ring = s => outlined(s) || s.boxShadow !== 'none';
const line = s => s.stroke === colour && parseFloat(s.strokeWidth) >= 2;
const round = ring(getComputedStyle(e)) || ring(getComputedStyle(e, '::after'));
const drawn = e instanceof SVGElement && [e, ...e.querySelectorAll('*')].some(part => line(getComputedStyle(part)));
const inside = place.bottom > 0 && place.top < innerHeight && place.right > 0 && place.left < innerWidth;
const name = e === document.body ? '' : (e.getAttribute('aria-label') || e.innerText || '').trim();
const faults = [!(round || drawn) && 'no ring', !inside && 'out of view'].filter(Boolean);
return {name, kind: e.tagName.toLowerCase() + '.' + (e.className.baseVal ?? e.className), faults};
