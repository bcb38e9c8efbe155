// Something that moves and something that changes slowly, if the page lets them; gives how many do.
const style = document.createElement('style'), thing = document.createElement('div');
style.textContent = `@keyframes turn { to { rotate: 1turn } }
    .moving { animation: turn 9s infinite; transition: opacity 9s }`;
thing.className = 'moving';
document.body.append(style, thing);
getComputedStyle(thing).opacity;
thing.style.opacity = 0.5;
getComputedStyle(thing).opacity;
const running = document.getAnimations().length;
style.remove();
thing.remove();
return running;
