() => {
  // Faults of a page as drawn: text over text, text outside its picture or its cell, anything beyond the edge of the screen.
  const faults = [], wide = window.innerWidth;
  const say = (what, element) => faults.push(what + ': "' + element.textContent.trim().replace(/\s+/g, ' ').slice(0, 60) + '"');
  if (document.documentElement.scrollWidth > wide + 1) faults.push('the page is ' + document.documentElement.scrollWidth + ' px wide on a screen of ' + wide);
  for (const element of document.querySelectorAll('main *')) {
    if (element.closest('svg') || element.closest('.table') || element.closest('figure.plot')) continue; // those scroll by themselves
    const box = element.getBoundingClientRect();
    if (box.width > 0 && (box.right > wide + 1 || box.left < -1)) say('beyond the edge', element);
  }
  for (const cell of document.querySelectorAll('th, td, dt, dd, li, p, h1, h2, figcaption'))
    if (cell.scrollWidth > cell.clientWidth + 1 && cell.clientWidth > 0) say('leaves its box', cell);
  for (const svg of document.querySelectorAll('figure > svg')) {
    const frame = svg.getBoundingClientRect(), scale = frame.width / svg.viewBox.baseVal.width;
    const texts = [...svg.querySelectorAll('text')].filter(t => t.textContent.trim().length > 0).map(t => {
      const panel = t.ownerSVGElement;
      let limit = frame;
      if (panel !== svg) // a panel cuts off what leaves it
        limit = new DOMRect(frame.left + panel.x.baseVal.value * scale, frame.top + panel.y.baseVal.value * scale, panel.width.baseVal.value * scale, panel.height.baseVal.value * scale);
      return { element: t, box: t.getBoundingClientRect(), limit };
    });
    if (texts.length === 0) faults.push('a figure without text');
    for (const t of texts) {
      if (t.box.width <= 0) say('text without width', t.element);
      if (t.box.left < t.limit.left - 1 || t.box.right > t.limit.right + 1 || t.box.top < t.limit.top - 2 || t.box.bottom > t.limit.bottom + 2) say('label leaves its picture', t.element);
    }
    for (let i = 0; i < texts.length; i++)
      for (let k = i + 1; k < texts.length; k++) {
        const a = texts[i].box, b = texts[k].box;
        const across = Math.min(a.right, b.right) - Math.max(a.left, b.left), down = Math.min(a.bottom, b.bottom) - Math.max(a.top, b.top);
        // A text's box holds room for accents and tails; letters touch when a third of the lower one is covered.
        if (across > 1 && down > 0.33 * Math.min(a.height, b.height)) faults.push('labels overlap: "' + texts[i].element.textContent.trim() + '" and "' + texts[k].element.textContent.trim() + '"');
      }
  }
  return faults;
}
