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

/** Where the first such link on the list of goods-in leads. */
const goodsIn = (selector) => async (page) => {
  await page.goto("/goods-in");
  const link = page.locator(`main a${selector}`).first();
  return (await link.count()) > 0 ? await link.getAttribute("href") : undefined;
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
      alerts: "/alerts",
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
      alerts: "/alerts",
    },
  },
  {
    role: "goods-in",
    email: "rosa.finchley@larkmoor.example",
    screens: {
      "goods-in": "/goods-in",
      "goods-in-nothing-found": "/goods-in?find=nothing-like-it",
      receive: goodsIn('[href^="/goods-in/returns/"]:not([href*="/bench/"])'),
      bench: goodsIn('[href*="/bench/"]'),
      "parcel-new": "/goods-in/parcels/new",
      "parcel-match": goodsIn('[href^="/goods-in/parcels/"]:not([href$="/new"])'),
    },
  },
  {
    role: "analyst",
    email: "nadia.brook@larkmoor.example",
    screens: {
      "life-curves": "/life-curves",
      "life-curves-upper": "/life-curves?axis=upper&count=upheld",
      "life-curves-claims": "/life-curves/claims",
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

/** The first link of a page that leads below it. */
const linkOn = (page, place) =>
  page
    .goto(place)
    .then(() => page.locator(`main a[href^="${place}/"]:not([href$="/new"], [href$="/invite"])`).first())
    .then(async (link) => ((await link.count()) > 0 ? await link.getAttribute("href") : undefined));

/** A page and what is done on it before it is looked at. */
const after = (place, act) => async (page) => {
  const path = typeof place === "string" ? place : await place(page);
  return path && { path, act };
};
const press = (name) => async (page) => {
  await page.getByRole("button", { name }).first().click();
  await page.waitForLoadState("networkidle");
  await page.waitForTimeout(500);
};
const BAD_LINES =
  "Account;Invoice;Line;Invoice day;Currency;Part number;Quantity;Serial;Batch;Net price;Tax category;Tax rate\n" +
  "L-2041;LOOK-1;1;2026-03-02;GBP;LMB-2410;;R2614LOOK1;R2614;86,40;S;20\n" +
  "L-9999;LOOK-1;2;2026-13-02;GBP;NO-SUCH;;R2614LOOK2;R2614;eighty;S;20\n";
const sendBadLines = async (page) => {
  await page
    .locator('input[type="file"]')
    .setInputFiles({ name: "lines-with-errors.csv", mimeType: "text/csv", buffer: Buffer.from(BAD_LINES) });
  await press("Check the file")(page);
  await page.waitForURL(/invoice-lines\/./);
  await page.waitForLoadState("networkidle");
};

/** More people, and states of a page that somebody has to bring about; for pictures only. */
export const MORE_SCREENS = [
  {
    role: "technician-acting",
    email: "lou.tanner@saltmarsh.example",
    screens: { sent: claim("own", "onThem", { rest: "?sent=1" }) },
  },
  {
    role: "manager",
    email: "maren.holt@saltmarsh.example",
    screens: {
      today: "/workshop-today",
      people: "/people",
      person: (page) => linkOn(page, "/people"),
      "claim-declined": claim("own", "decided", { marks: ["declined"] }),
    },
  },
  {
    role: "german-technician",
    email: "jonas.ehrler@quayhead.example",
    screens: {
      today: "/workshop-today",
      "start-a-claim": "/claims/new",
      "draft-evidence": draft("evidence"),
      "draft-check": draft("check"),
      "claim-answer-needed": claim("own", "onUs", { marks: ["answerNeeded"] }),
      "claim-with-the-distributor": claim("own", "onThem"),
      "claim-decided": claim("own", "decided"),
      account: "/account",
    },
  },
  {
    role: "german-assessor",
    email: "greta.lindau@fenwright.example",
    screens: {
      "to-judge": "/judging",
      "all-claims": "/judging?view=all",
      "claim-filed": claim("received", "toJudge"),
      "claim-in-hand": claim("received", "held"),
      decide: claim("received", "held", { rest: "/decide" }),
      "decide-refused": after(claim("received", "held", { rest: "/decide" }), press("Entscheidung senden")),
      "claim-decided": claim("received", "decided"),
      "rule-book": "/rule-book",
    },
  },
  {
    role: "goods-in-acting",
    email: "rosa.finchley@larkmoor.example",
    screens: {
      home: "/",
      account: "/account",
      "receive-refused": after(
        goodsIn('[href^="/goods-in/returns/"]:not([href*="/bench/"])'),
        press("Receive"),
      ),
      "finding-refused": after(goodsIn('[href*="/bench/"]'), press("Write the finding")),
    },
  },
  {
    role: "administrator-acting",
    email: "colin.thorpe@larkmoor.example",
    screens: {
      person: (page) => linkOn(page, "/people"),
      "invite-refused": after("/people/invite", press("Send the invitation")),
      "account-refused": after("/accounts/new", press("Open the account")),
      "import-with-errors": after("/invoice-lines", sendBadLines),
    },
  },
  {
    role: "assessor-acting",
    email: "ada.merrow@larkmoor.example",
    screens: {
      "decide-refused": after(claim("received", "held", { rest: "/decide" }), press("Send verdict")),
      "claim-contested": claim("received", "toJudge", { marks: ["contested"] }),
      "claim-upheld": claim("received", "decided", { marks: ["upheld", "upheldInPart"] }),
      "all-claims": "/judging?view=all",
    },
  },
];
