/**
 * F6 and Shift+F6 move between the parts of the page. Tab alone cannot: inside the
 * grid it moves between cells, so without this the keyboard would be caught there. A part
 * is an element with `data-region`, whose value selects what in it takes the focus.
 */

export function moveBetweenRegions(): void {
  window.addEventListener(
    'keydown',
    (event) => {
      if (event.key !== 'F6') return;
      event.preventDefault();
      event.stopPropagation();
      const regions = [...document.querySelectorAll<HTMLElement>('[data-region]')];
      const here = regions.findIndex((region) => region.contains(document.activeElement));
      const step = event.shiftKey ? -1 : 1;
      const next = regions[(here + step + regions.length) % regions.length];
      next?.querySelector<HTMLElement>(next.dataset.region ?? '')?.focus();
    },
    { capture: true },
  );
}
