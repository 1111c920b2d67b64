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

/** Where the first such link of a page leads. */
const firstOn = (place, selector) => async (page) => {
  await page.goto(place);
  const link = page.locator(`main ${selector}`).first();
  return (await link.count()) > 0 ? await link.getAttribute("href") : undefined;
};
const goodsIn = (selector) => firstOn("/goods-in", `a${selector}`);

/** The first claim of this workshop with a part that is called in and still to be sent. */
const calledIn = async (page) => {
  await page.goto("/workshop-today");
  const links = page.locator('main a[href^="/claims/"]');
  const paths = new Set(await links.evaluateAll((all) => all.map((link) => link.getAttribute("href"))));
  for (const path of paths) {
    const sheet = await page.request.get(path);
    if ((await sheet.text()).includes('id="called-in"')) return path;
  }
  return undefined;
};

/** The first link of a page that leads below it. */
const linkOn = (page, place) =>
  page
    .goto(place)
    .then(() => page.locator(`main a[href^="${place}/"]:not([href$="/new"], [href$="/invite"])`).first())
    .then(async (link) => ((await link.count()) > 0 ? await link.getAttribute("href") : undefined));

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
      "claim-part-called-in": calledIn,
      "claim-upheld": claim("own", "decided", { marks: ["upheld", "upheldInPart"] }),
      "claim-declined": claim("own", "decided", { marks: ["declined"] }),
      "nothing-found": "/workshop-today?view=all&q=nothing-like-it",
      alerts: "/alerts",
      account: "/account",
      help: "/help",
    },
  },
  {
    role: "manager",
    email: "maren.holt@saltmarsh.example",
    screens: {
      today: "/workshop-today",
      "claim-declined": claim("own", "decided", { marks: ["declined"] }),
      "claim-settled": claim("own", "closed", { marks: ["settled"] }),
      "credit-notes": "/credit-notes",
      "credit-note": (page) => linkOn(page, "/credit-notes"),
      installers: "/installers",
      installer: (page) => linkOn(page, "/installers"),
      "rule-book": "/rule-book",
      "rule-book-credits": "/rule-book?sheet=credit",
      people: "/people",
      person: (page) => linkOn(page, "/people"),
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
    role: "accounts",
    email: "edwin.marsh@larkmoor.example",
    screens: {
      credits: "/credits",
      "credits-all": "/credits?view=all",
      "credit-notes": "/credit-notes",
      "credit-note": firstOn("/credits?view=open", 'a[href^="/credit-notes/"]'),
      "credit-note-used": firstOn("/credits?view=used", 'a[href^="/credit-notes/"]'),
      "counter-note": firstOn("/credits?view=all", 'tr:has-text("Counter note") a[href^="/credit-notes/"]'),
      "day-book": "/day-book",
      "day-book-nothing-found": "/day-book?month=2019-01",
    },
  },
  {
    role: "analyst",
    email: "nadia.brook@larkmoor.example",
    screens: {
      "life-curves": "/life-curves",
      "life-curves-upper": "/life-curves?axis=upper&count=upheld",
      "life-curves-claims": firstOn("/life-curves", 'a[href^="/life-curves/claims"]'),
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
    role: "german-technician",
    email: "jonas.ehrler@quayhead.example",
    screens: {
      today: "/workshop-today",
      "start-a-claim": "/claims/new",
      "draft-evidence": draft("evidence"),
      "draft-fault": draft("fault"),
      "draft-check": draft("check"),
      "claim-answer-needed": claim("own", "onUs", { marks: ["answerNeeded"] }),
      "claim-with-the-distributor": claim("own", "onThem"),
      "claim-part-called-in": calledIn,
      "claim-decided": claim("own", "decided"),
      account: "/account",
    },
  },
  {
    role: "german-manager",
    email: "wiebke.sandner@quayhead.example",
    screens: {
      today: "/workshop-today",
      "claim-decided": claim("own", "decided"),
      "credit-notes": "/credit-notes",
      installers: "/installers",
      "rule-book": "/rule-book",
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
    role: "accounts-acting",
    email: "edwin.marsh@larkmoor.example",
    screens: {
      "credits-refused": after("/credits", press("Issue the ticked credit notes")),
      "allocation-refused": after(
        firstOn("/credits?view=open", 'a[href^="/credit-notes/"]'),
        press("Allocate"),
      ),
    },
  },
  {
    role: "german-accounts",
    email: "holger.bruns@fenwright.example",
    screens: {
      "goods-in": "/goods-in",
      credits: "/credits?view=all",
      "credit-note": firstOn("/credits?view=all", 'a[href^="/credit-notes/"]'),
      "day-book": "/day-book",
    },
  },
  {
    role: "german-analyst",
    email: "imke.rahn@fenwright.example",
    screens: { "life-curves": "/life-curves" },
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
