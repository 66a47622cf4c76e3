/** How wide text is in the font of an element, px, without laying it out. */
let context: CanvasRenderingContext2D | null = null;

export function textWidth(text: string, element: Element): number {
  context ??= document.createElement('canvas').getContext('2d');
  if (context === null) return 0;
  context.font = getComputedStyle(element).font;
  return context.measureText(text).width;
}
