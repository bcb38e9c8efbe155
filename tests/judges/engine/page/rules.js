// The rules of access that the page breaks, each with a few places. Of the small pictures of printed pages only their names are looked at: what is
// drawn there is for paper.
const done = arguments[arguments.length - 1];
const broken = rule => [rule.id, rule.nodes.slice(0, 3).map(node => node.target.join(' '))];
axe.run({exclude: [['.sheet-previews svg > *']]}, OPTIONS).then(found => done(found.violations.map(broken)), fault => done([String(fault)]));
