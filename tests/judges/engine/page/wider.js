// How much wider than the screen the page is, and what reaches past it without a frame of its own to scroll in.
const page = document.documentElement, over = page.scrollWidth - page.clientWidth;
const framed = e => e && e !== document.body
    && (['auto', 'scroll', 'hidden'].includes(getComputedStyle(e).overflowX) || framed(e.parentElement));
const past = e => e.getBoundingClientRect().right > page.clientWidth + 0.5 && !framed(e.parentElement);
const found = over > 0 ? [...document.body.querySelectorAll('*')].filter(past) : [];
return [over, found.slice(0, 5).map(e => e.tagName + '.' + (e.className.baseVal ?? e.className))];
