// How many things of the page move or would.
const lasts = times => times.split(', ').some(time => parseFloat(time) > 0);
const moves = s => s.animationName !== 'none' || lasts(s.transitionDuration) || s.scrollBehavior === 'smooth';
const restless = e => [null, '::before', '::after'].some(part => moves(getComputedStyle(e, part)));
return [...document.querySelectorAll('*')].filter(restless).length + document.getAnimations().length
    + document.querySelectorAll('animate, animateTransform, animateMotion').length;
