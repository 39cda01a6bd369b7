package org.minorant.study;

import java.io.StringReader;
import javax.xml.XMLConstants;
import javax.xml.parsers.DocumentBuilderFactory;
import org.w3c.dom.Document;
import org.xml.sax.InputSource;

/** Reads a chart back as XML, with nothing fetched from anywhere. */
final class Svg {

    private final String text;
    private final Document document;

    private Svg(String text, Document document) {
        this.text = text;
        this.document = document;
    }

    /** Fails if the text is not well-formed XML or its root is not an SVG picture. */
    static Svg parse(String text) throws Exception {
        DocumentBuilderFactory factory = DocumentBuilderFactory.newInstance();
        factory.setFeature(XMLConstants.FEATURE_SECURE_PROCESSING, true);
        factory.setFeature("http://apache.org/xml/features/disallow-doctype-decl", true);
        factory.setNamespaceAware(true);
        Document document = factory.newDocumentBuilder().parse(new InputSource(new StringReader(text)));
        if (!document.getDocumentElement().getLocalName().equals("svg")
                || !"http://www.w3.org/2000/svg"
                        .equals(document.getDocumentElement().getNamespaceURI())) {
            throw new IllegalArgumentException("not an SVG picture");
        }
        return new Svg(text, document);
    }

    String title() {
        return document.getElementsByTagName("title").item(0).getTextContent();
    }

    /** How many shapes are stroked or filled in a colour such as {@code 0,114,178}. */
    int shapes(String rgb) {
        return text.split("rgb\\(" + rgb + "\\)", -1).length - 1;
    }
}
