/** The first claim of a view, as the person signed in sees it; null where there is none. */
const firstOf = async (page, side, view) => {
  const answer = await page.request.get(`/api/v1/claims?side=${side}&view=${view}`);
  return answer.ok() ? ((await answer.json()).items[0]?.number ?? null) : null;
};
const claim =
  (side, view, rest = "") =>
  async (page) => {
    const number = await firstOf(page, side, view);
    return number && `/claims/${number}${rest}`;
  };

/** Every screen by the person who lives in it. A path may be found out first; what has no claim to show is left out. */
export const SCREENS = [
  {
    role: "visitor",
    email: null,
    screens: {
      "sign-in": "/sign-in",
      forgotten: "/forgotten",
      "spent-link": "/reset/spent",
      "not-found": "/nowhere",
    },
  },
  {
    role: "technician",
    email: "lou.tanner@saltmarsh.example",
    screens: {
      today: "/workshop-today",
      "start-a-claim": "/claims/new",
      "serial-found": "/claims/new?q=OSB7",
      "serial-unknown": "/claims/new?q=ZZZZ9999",
      "draft-part": claim("own", "drafts", "/part"),
      "draft-fault": claim("own", "drafts", "/fault"),
      "draft-evidence": claim("own", "drafts", "/evidence"),
      "draft-check": claim("own", "drafts", "/check"),
      "claim-answer-needed": claim("own", "onUs"),
      "claim-with-the-distributor": claim("own", "onThem"),
      "claim-decided": claim("own", "decided"),
      "nothing-found": "/workshop-today?view=all&q=nothing-like-it",
      account: "/account",
      help: "/help",
    },
  },
  {
    role: "assessor",
    email: "ada.merrow@larkmoor.example",
    screens: {
      "to-judge": "/judging",
      "to-judge-mine": "/judging?view=mine",
      "claim-filed": claim("received", "toJudge"),
      "claim-in-hand": claim("received", "mine"),
      ask: claim("received", "mine", "/ask"),
      decide: claim("received", "mine", "/decide"),
      "claim-decided": claim("received", "decided"),
      "rule-book": "/rule-book",
    },
  },
  {
    role: "administrator",
    email: "colin.thorpe@larkmoor.example",
    screens: {
      "invoice-lines": "/invoice-lines",
      catalogue: "/catalogue",
      "catalogue-new": "/catalogue/new",
      accounts: "/accounts",
      "accounts-new": "/accounts/new",
      people: "/people",
      "rule-book": "/rule-book",
    },
  },
];
