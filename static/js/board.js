// Keeps a hall's board fresh: asks for it every 15 seconds and swaps it in. Where two asks in a row
// fail, the board dims and says since when it has been cut off; it never passes stale for live.
const everySeconds = 15;
let failures = 0;

async function refresh() {
  const board = document.querySelector("main[data-board]");
  try {
    const answer = await fetch(board.dataset.board, {
      headers: { "HX-Request": "true" },
      signal: AbortSignal.timeout(10_000),
    });
    if (!answer.ok) {
      throw new Error(String(answer.status));
    }
    const fresh = new DOMParser().parseFromString(await answer.text(), "text/html");
    board.replaceWith(fresh.querySelector("main[data-board]"));
    failures = 0;
  } catch {
    failures += 1;
    if (failures >= 2) {
      board.classList.add("board-stale");
      board.querySelector(".stale-word").hidden = false;
    }
  }
}

setInterval(refresh, everySeconds * 1000);
