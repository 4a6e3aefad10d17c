/** Whatever asks for the module `electron` gets the stand-in. */
const Module = require("node:module");
const { join } = require("node:path");

const found = Module._resolveFilename;
Module._resolveFilename = function resolve(request, ...rest) {
  return request === "electron" ? join(__dirname, "module.cjs") : found.call(this, request, ...rest);
};
