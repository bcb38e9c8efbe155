// The rules of access that the page breaks, each with a few places.
const done = arguments[arguments.length - 1];
const broken = rule => [rule.id, rule.nodes.slice(0, 3).map(node => node.target.join(' '))];
axe.run(document, OPTIONS).then(found => done(found.violations.map(broken)), fault => done([String(fault)]));
