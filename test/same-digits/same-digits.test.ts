import variant from "@jitl/quickjs-wasmfile-release-sync";
import { newQuickJSWASMModuleFromVariant } from "quickjs-emscripten-core";
import { expect, it } from "vitest";
import { differing } from "./differing.js";
import { digitsScript } from "./digits-script.js";
import { engineDigits, type Digits } from "./engine-digits.js";

// Source: an engine of JavaScript that has nothing in common with Node's, nor its mathematical library; it interprets, so that it takes a minute on a busy machine.
it("another engine makes the same figures of the same code, though its own functions differ", async () => {
  const context = (await newQuickJSWASMModuleFromVariant(variant)).newContext();
  context.unwrapResult(context.evalCode(await digitsScript(), "digits.js")).dispose();
  const there = JSON.parse(context.unwrapResult(context.evalCode("work(2000, false)")).consume((text) => context.getString(text))) as Digits;
  const here = engineDigits(2000, false);
  expect(differing(here.ours, there.ours)).toEqual({});
  expect(here.ours.cells.length).toBeGreaterThan(10);
  // were its own functions alike too, this test could not tell anything
  expect(Object.keys(differing(here.its, there.its))).toEqual(["exp", "log", "sin", "tanh", "hypot", "cube"]);
}, 300_000);
