import type { StoryTexts } from "./texts";

export const GERMAN: StoryTexts = {
  notes: {
    brake: {
      grabsWhenWarm: [
        "Kalt läuft alles. Nach {minutes} Minuten auf dem Bock greift die Bremse. Abgekühlt ist sie wieder frei.",
      ],
      drags: ["Schleift und wird heiß. Der Luftspalt liegt in der Grenze."],
      noise: ["Klappert im gelösten Zustand, seit etwa einer Woche. Hält gut."],
      willNotHold: ["Das Fahrzeug rollte trotz Bremse zurück. Niemand wurde verletzt. Stillgelegt."],
    },
    motor: {
      weakWhenWarm: [
        "Kalt kräftig, nach {minutes} Minuten schafft er keinen Bordstein. Doppelter Strom gegenüber der anderen Seite.",
      ],
      runsRough: ["Läuft unten herum rau, eine Bürste feuert. Kollektor gereinigt, ohne Besserung."],
    },
    controller: {
      cutsOutWhenWarm: ["Schaltet nach {minutes} Minuten ab und kommt nach dem Abkühlen wieder."],
      faultShown: ["Zeigt beim Einschalten eine Störung. Bremsspule und Motor zuerst gemessen: beide gut."],
    },
    charger: {
      dead: ["Keine Ausgangsspannung, keine Lampe. Sicherung und Netz sind gut."],
      chargesTooLittle: [
        "Lädt mit einem Zehntel des Stroms und wird nie fertig. Batterien sind am anderen Lader gut.",
      ],
    },
    battery: {
      shortRange: ["Reichweite nur noch drei Kilometer. Ein Block bricht unter Last ein, der andere hält."],
      willNotCharge: ["Nimmt an zwei Ladern, die andere Fahrzeuge laden, keine Ladung an."],
    },
    gearbox: {
      noise: ["Mahlt unter Last. Motor getauscht: Das Geräusch blieb beim Getriebe."],
      wheelNotDriven: ["Motor dreht, Rad nicht. Die Welle lässt sich von Hand drehen."],
    },
    throttle: {
      jumps: ["Das Tempo springt bei halbem Weg. Die Bahn hat dort eine Lücke."],
      dead: ["Kein Antrieb. Speisung ist da, der Schleifer gibt nichts ab."],
    },
  },
  answers: {
    oilOrDirt: ["Trocken und sauber.", "Etwas Staub, kein Öl."],
    handReleaseLever: ["In Fahrstellung, frei beweglich."],
    faultCode: ["Zweimal lang, dreimal kurz.", "Viermal blinken, dann Pause."],
    waterTrace: ["Keine.", "Stecker innen trocken."],
    programVersion: ["3.14"],
    lampState: ["Bleibt rot.", "Keine Lampe."],
    batteryTypeUsed: ["Zwei Vliesblöcke, 50 Ah."],
    chargerUsed: ["Der mitgelieferte Lader, 6 A."],
    noiseAndPlay: ["Mahlt unter Last, am Rad etwa 4 mm Spiel."],
    oilTrace: ["Keine.", "Ein Film am Wellendichtring."],
    wheelFixing: ["Fest, Farbmarke unverletzt."],
    motorSwapped: ["Ja, gegen einen guten. Der Fehler blieb."],
    wiperSweep: ["Bis zur Hälfte glatt, dann ein Sprung.", "Kein Signal auf dem ganzen Weg."],
    returnToNeutral: ["Geht von selbst zurück."],
  },
  otherAnswer: "Geprüft, siehe Notiz.",
  cannotGet: ["Das Fahrzeug ist schon wieder beim Kunden.", "Der Deckel ist bei dieser Bauart genietet."],
  leftOut: "Das Messgerät lag am anderen Platz.",
  ruledOut: ["Gemessen.", "Von Hand geprüft.", "Gegen ein gutes Teil getauscht."],
  looseNut: "Mutter eine halbe Umdrehung lose, Passfeder neben ihrem Sitz.",
  keyOutOfSeat: "Die Passfeder lag neben ihrem Sitz, als das Rad abkam.",
  incident: "Das Fahrzeug rollte auf einer Rampe einen Meter zurück. Niemand wurde verletzt.",
  question: [
    "Für die Entscheidung fehlt, was unten angehakt ist. Ein Foto mit dem Messwert genügt.",
    "Bis hierher alles gut. Ergänzen Sie, was unten angehakt ist, mit der Raumtemperatur neben dem Messwert.",
  ],
  park: "Kennen Sie diesen Blinkcode bei dieser Fahrsteuerung?",
  parkChain: "Zweiter Motor an diesem Fahrzeug in einem Jahr. Was macht sie kaputt?",
  putBack: "Ich kenne den Kunden. Das übernimmt jemand anderes.",
  withdraw: "Neben dem Teil lag ein durchgescheuertes Kabel. Das Teil ist gut.",
  contest:
    "Ihr Lauf war kalt. Bei uns kommt der Fehler erst nach {minutes} Minuten, der Messschrieb liegt bei. Lassen Sie es warm so lange laufen wie wir.",
  reasons: {
    faultOfThePart:
      "Messwerte und Lauf zeigen einen Fehler des Teils selbst. Nichts spricht für Einbau oder Gebrauch.",
    partlyWorn:
      "Das Teil hatte einen Fehler und einen guten Teil seines Lebens hinter sich. Der verschlissene Anteil ist nicht gedeckt.",
    sharedCause: "Das Teil war fehlerhaft, der Einbau hatte einen Anteil daran.",
    outsideTerm: "Am Tag des Ausfalls war die Frist abgelaufen.",
    fittingFault: "Die Passfeder lag neben ihrem Sitz. Das Rad arbeitete sich los.",
    noFaultShown: "Das Teil lief zehn Minuten auf unserem Prüfstand und zeigte keinen Fehler.",
  },
  letters: {
    upheld: "Danke für die vollständige Meldung. Wir erkennen sie an: {part}, Seriennummer {serial}.",
    upheldInPart:
      "Wir erkennen die Meldung teilweise an: {part}, Seriennummer {serial}. Der Grund steht bei der Zeile.",
    declined:
      "Wir können die Meldung nicht anerkennen: {part}, Seriennummer {serial}. Grund und Weg zum Widerspruch stehen bei der Zeile.",
    reversed:
      "Ihr Widerspruch war berechtigt. Warm und so lange wie bei Ihnen zeigt das Teil den Fehler. Wir erkennen die Meldung an: {part}, Seriennummer {serial}.",
  },
  waived: "Fotos, Messschrieb und Messwerte sind eindeutig: Das Teil muss nicht zurück.",
  looks: { sameUnit: "Seriennummer wie gemeldet.", marksOfWork: "Keine." },
  findings: {
    faultConfirmed: "Der Fehler tritt auf wie gemeldet.",
    otherFault:
      "Das Teil selbst ist gut. Die Passfeder hat in der Welle gearbeitet, der Sitz ist einseitig verschlissen.",
    noFaultFound: "Warm länger gelaufen als in der Meldung. Kein Fehler, alle Messwerte in den Grenzen.",
    notTheUnit: "Die Seriennummer auf dem Teil ist nicht die gemeldete.",
    damagedOnTheWay: "Paket durchnässt, Wasser im Teil. Getrocknet und fotografiert, nicht gelaufen.",
    notTestable: "Der Prüfstand ist in Reparatur. Zehn Minuten kalt gelaufen, ohne Fehler.",
  },
  returns: {
    department: "Wareneingang",
    instructions: {
      brake: "Kabel am Teil lassen. Bremse nicht öffnen.",
      motor: "Bürsten im Motor lassen. Leitung am Gehäuse festbinden.",
      battery: "Pole abkleben, aufrecht. Gebläht oder nass nicht mit der gewöhnlichen Post.",
      gearbox: "Öl ablassen, Passfeder in einen Beutel.",
    },
    carriers: ["Küstenbote", "Paketlinie Nord"],
    wet: "Nass angekommen, Karton weich.",
    notSent: "Die Frist ist um, zwei Mails blieben ohne Antwort.",
    missing: "Der Paketdienst sucht seit zehn Tagen. Der Versandbeleg ist gut.",
    damaged: "Eine Ecke eingedrückt, das Teil sieht heil aus.",
    otherSerial: "R2608-7KT4P",
  },
  counterReason: "Mit falschem Anteil ausgestellt. Eine neue Gutschrift folgt.",
  messages: {
    parcelSent: "Mit dem üblichen Paketdienst versandt, Sendung 0041 7720 5518.",
    parcelMissing: "Unter dieser Nummer ist hier nichts angekommen. Wir fragen beim Paketdienst nach.",
    parcelInside:
      "Der Paketdienst meldet Verlust. Der Beleg ist gut, das geht nicht zu Lasten der Werkstatt.",
    thanks: "Danke, damit ist alles da.",
    reuseInside:
      "Dieses Foto gab es schon bei einer anderen Meldung derselben Werkstatt. Erst fragen, dann urteilen.",
    serialInside: "Diese Seriennummer haben wir nie versandt. Eine sehr ähnliche schon, an diese Werkstatt.",
  },
  log: { on: "Ein", brakeFault: "Störung: Bremse schleift", fault: "Störung: schaltet ab", off: "Aus" },
  documents: {
    capacity: [
      "KAPAZITÄTSPRÜFUNG",
      "Konstantstrom 2,5 A bis 10,5 V",
      "Raum 21 °C, beide Blöcke einzeln geprüft",
    ],
  },
};
