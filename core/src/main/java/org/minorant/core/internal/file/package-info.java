/** Parsers and writers of the file formats: strict, and bounded by the size of the file, never by what it declares. */
package org.minorant.core.internal.file;
