import { kernelFigures } from "./kernel-figures.js";

// The same file is a page's script, which starts a thread of itself, and that thread.
if (typeof document === "undefined") {
  self.postMessage(kernelFigures());
} else {
  const thread = new Worker("kernels-alone.js");
  thread.onmessage = ({ data }) => Object.assign(window, { said: { page: kernelFigures(), thread: data as unknown } });
}
