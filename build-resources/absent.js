/** Stands for optional packages of jsPDF that this program never calls. */
export default function absent() {
  throw new Error("this program does not turn web pages into PDF");
}
