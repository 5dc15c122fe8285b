/**
 * Hands a picture of the page to the person as a file that looks the same elsewhere: the page's colours are written into it.
 *
 * @param picture  as drawn
 * @param about    element around it, whose colours it uses
 * @param name     of the file
 */
export function savePicture(picture: SVGSVGElement, about: HTMLElement, name: string): void {
  const look = getComputedStyle(about);
  const copy = picture.cloneNode(true) as SVGSVGElement;
  copy.setAttribute("xmlns", "http://www.w3.org/2000/svg");
  copy.style.background = look.backgroundColor;
  copy.style.color = look.color;
  const text = new XMLSerializer().serializeToString(copy).replace(/var\((--[\w-]+)\)/g, (whole, variable: string) => look.getPropertyValue(variable).trim() || whole);
  const address = URL.createObjectURL(new Blob([text], { type: "image/svg+xml" }));
  const link = document.createElement("a");
  link.href = address;
  link.download = name;
  link.click();
  // the browser reads the address in a later turn
  setTimeout(() => URL.revokeObjectURL(address), 10_000);
}
