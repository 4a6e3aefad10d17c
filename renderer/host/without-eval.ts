import { config } from "zod";

/**
 * The window's policy forbids code that is made from text, with which zod would speed itself up; it must not even try. This has to be loaded
 * before the first schema is made, so that the window imports it first of all.
 */
config({ jitless: true });
