/** The first claim of a view (with one of these marks), as the person signed in sees it, and a page of it. */
const claim =
  (side, view, { marks = null, rest = "" } = {}) =>
  async (page) => {
    const answer = await page.request.get(`/api/v1/claims?side=${side}&view=${view}`);
    const { items } = answer.ok() ? await answer.json() : { items: [] };
    const found = items.find(({ mark }) => marks === null || marks.includes(mark));
    return found && `/claims/${found.number}${rest}`;
  };
const draft = (step) => claim("own", "onUs", { marks: ["draft"], rest: `/${step}` });

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
      "serial-found": "/claims/new?serial=R2614661KM",
      "serial-unknown": "/claims/new?serial=ZZZZ9999",
      "draft-part": draft("part"),
      "draft-fault": draft("fault"),
      "draft-evidence": draft("evidence"),
      "draft-check": draft("check"),
      "claim-answer-needed": claim("own", "onUs", { marks: ["answerNeeded"] }),
      "claim-with-the-distributor": claim("own", "onThem"),
      "claim-upheld": claim("own", "decided", { marks: ["upheld", "upheldInPart"] }),
      "claim-declined": claim("own", "decided", { marks: ["declined"] }),
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
      "to-judge-mine": "/judging?view=held",
      "claim-filed": claim("received", "toJudge"),
      "claim-in-hand": claim("received", "held"),
      ask: claim("received", "held", { rest: "/ask" }),
      decide: claim("received", "held", { rest: "/decide" }),
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
