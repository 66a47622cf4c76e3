/** How wide text is in the font of an element, px, without laying it out. */
let context: CanvasRenderingContext2D | null = null;

export function textWidth(text: string, element: Element): number {
  context ??= document.createElement('canvas').getContext('2d');
  if (context === null) return 0;
  // The shorthand is empty where a font varies in ways that it cannot say.
  const { fontWeight, fontSize, fontFamily } = getComputedStyle(element);
  context.font = `${fontWeight} ${fontSize} ${fontFamily}`;
  return context.measureText(text).width;
}
